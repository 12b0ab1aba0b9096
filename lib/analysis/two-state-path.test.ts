import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { twoStatePath } from "./two-state-path";

/** Every path of a short chain, scored as the definition says. */
function bestByTrial(evidence: readonly number[], penalty: number): number {
  let best = -Infinity;
  for (let code = 0; code < 1 << evidence.length; code++) {
    let score = 0;
    for (let i = 0; i < evidence.length; i++) {
      const on = (code >> i) & 1;
      if (on === 1) score += evidence[i] ?? 0;
      if (i > 0 && on !== ((code >> (i - 1)) & 1)) score -= penalty;
    }
    best = Math.max(best, score);
  }
  return best;
}

const scoreOf = (evidence: readonly number[], on: readonly boolean[], penalty: number): number =>
  evidence.reduce(
    (sum, value, i) => sum + (on[i] ? value : 0) - (i > 0 && on[i] !== on[i - 1] ? penalty : 0),
    0,
  );

describe("twoStatePath", () => {
  it("finds a path as good as the best of all paths tried one by one", () => {
    const evidence = fc.array(fc.double({ min: -4, max: 4, noNaN: true }), { minLength: 1, maxLength: 9 });
    fc.assert(
      fc.property(evidence, fc.double({ min: 0.5, max: 6, noNaN: true }), (values, penalty) => {
        const on = Array.from(twoStatePath(values, penalty), (odds) => odds > 0);
        expect(scoreOf(values, on, penalty)).toBeCloseTo(bestByTrial(values, penalty), 9);
      }),
      { seed: 7, numRuns: 300 },
    );
  });

  it("keeps its state through a contradiction that costs less than two changes", () => {
    const on = Array.from(twoStatePath([5, 5, -4, 5, 5], 5), (odds) => odds > 0);
    expect(on).toEqual([true, true, true, true, true]);
  });

  it("is empty for an empty series", () => {
    expect(twoStatePath([], 5)).toHaveLength(0);
  });
});
