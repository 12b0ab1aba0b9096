/** Normal distribution function by Abramowitz and Stegun 1964, 7.1.26 (error below 1.5e-7). */
function normalCdf(z: number): number {
  const x = Math.abs(z) / Math.SQRT2;
  const t = 1 / (1 + 0.3275911 * x);
  const tail =
    t * (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  const half = 0.5 * tail * Math.exp(-x * x);
  return z > 0 ? 1 - half : half;
}

/** Only this many rivals change the maximum visibly. */
const RIVALS_MAX = 40;
const STEPS = 160;

/**
 * By how much the largest of several estimates is expected to exceed the largest of their true values, when each
 * has an independent normal error: E[max(m_i + s z_i)] - max(m_i), with the estimates themselves for the m_i.
 *
 * In: the rivals (any order, the largest of them the maximum), their standard error s in the same unit.
 * Out: the excess, 0 for a single rival, none, or s of 0. The 40 largest are used.
 *
 * With F the product of the rivals' distribution functions, E[max] is the integral of 1 - F above 0 minus that of F
 * below, by Simpson's rule. Source: order
 * statistics, e.g. David and Nagaraja 2003, section 3.1.
 *
 * @example
 * excessOfMaximum([5], 1); // 0
 */
export function excessOfMaximum(rivals: readonly number[], standardError: number): number {
  if (rivals.length < 2 || !(standardError > 0)) return 0;
  const largest = [...rivals].sort((a, b) => b - a).slice(0, RIVALS_MAX);
  const top = largest[0] ?? 0;
  const offsets = largest.map((rival) => (rival - top) / standardError);
  const below = (z: number): number => offsets.reduce((share, offset) => share * normalCdf(z - offset), 1);
  // E[max] = integral of (1 - F) over z > 0 minus integral of F over z < 0.
  const height = 6;
  const step = (2 * height) / STEPS;
  let sum = 0;
  for (let k = 0; k <= STEPS; k++) {
    const z = -height + k * step;
    const weight = k === 0 || k === STEPS ? 1 : k % 2 === 1 ? 4 : 2;
    const share = below(z);
    // At the jump from -F to 1 - F Simpson's rule takes the middle.
    sum += weight * (z === 0 ? 0.5 - share : z > 0 ? 1 - share : -share);
  }
  return Math.max(0, (sum * step * standardError) / 3);
}
