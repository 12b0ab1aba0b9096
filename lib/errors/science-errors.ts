/**
 * There is not enough data for what was asked: a value, not a bug. `needed` and `got` count the same thing.
 *
 * @example
 * new InsufficientDataError("on-foil minutes", 5, 2).needed; // 5
 */
export class InsufficientDataError extends Error {
  readonly what: string;
  readonly needed: number;
  readonly got: number;

  constructor(what: string, needed: number, got: number) {
    super(`needs at least ${needed} ${what}, got ${got}`);
    this.name = "InsufficientDataError";
    this.what = what;
    this.needed = needed;
    this.got = got;
  }
}

/**
 * A numerical method did not converge or met an impossible intermediate value.
 *
 * @example
 * new NumericalError("bisection", 100, 0.5).iterations; // 100
 */
export class NumericalError extends Error {
  readonly method: string;
  readonly iterations: number;
  readonly residual: number;

  constructor(method: string, iterations: number, residual: number) {
    super(`${method} did not converge after ${iterations} iterations (residual ${residual})`);
    this.name = "NumericalError";
    this.method = method;
    this.iterations = iterations;
    this.residual = residual;
  }
}
