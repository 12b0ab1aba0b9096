/** A source of independent uniform numbers in [0, 1). */
export type Rng = () => number;

/**
 * A seeded 32-bit generator with period 2^32, so that everything random in the science can be repeated. The seed is
 * taken as an unsigned 32-bit integer. Fit for simulation and resampling, never for secrets.
 * Source: the public-domain generator mulberry32 (Tommy Ettinger, 2017), from memory.
 *
 * @example
 * seededRng(1)() === seededRng(1)(); // true
 */
export function seededRng(seed: number): Rng {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/**
 * One draw from the standard normal distribution. Source: Box and Muller, Ann. Math. Statist. 29 (1958).
 *
 * @example
 * Number.isFinite(standardNormal(seededRng(3))); // true
 */
export function standardNormal(rng: Rng): number {
  return Math.sqrt(-2 * Math.log(1 - rng())) * Math.cos(2 * Math.PI * rng());
}
