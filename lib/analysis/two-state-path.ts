const clamp = (value: number, limit: number): number => Math.max(-limit, Math.min(limit, value));

/**
 * The most probable path of a two-state chain (off, on) over a whole series, with memory: every change of
 * state costs `switchPenalty`, so that single odd samples change nothing.
 *
 * In: `evidence[i]`, the log-likelihood of "on" minus that of "off" at sample i (0 where nothing is known).
 * Out: the max-marginal log-odds of "on" per sample: the score of the best path through "on" at that sample
 * minus that of the best path through "off". Its sign is the Viterbi path, its size the margin. Same length.
 *
 * With two states the Viterbi recursion needs no back pointers: writing the forward message as the difference
 * of both scores, one step is a clamp to the penalty, and so is the backward one.
 *
 * Source: Viterbi 1967, IEEE Trans. Inf. Theory 13(2); max-marginals: Wainwright and Jordan 2008, section 8.
 *
 * @example
 * Array.from(twoStatePath([-1, -1, 3, -1, -1], 5), (m) => m > 0); // [false, false, false, false, false]
 * @example
 * Array.from(twoStatePath([-9, 6, 6, -9], 5), (m) => m > 0); // [false, true, true, false]
 */
export function twoStatePath(evidence: ArrayLike<number>, switchPenalty: number): Float64Array {
  const n = evidence.length;
  const oddsOn = new Float64Array(n);
  let forward = 0;
  for (let i = 0; i < n; i++) {
    forward = (evidence[i] ?? 0) + clamp(forward, switchPenalty);
    oddsOn[i] = forward;
  }
  let backward = 0;
  for (let i = n - 1; i >= 0; i--) {
    const own = oddsOn[i] ?? 0;
    oddsOn[i] = own + clamp(backward, switchPenalty);
    backward = (evidence[i] ?? 0) + clamp(backward, switchPenalty);
  }
  return oddsOn;
}
