import { readFileSync } from "node:fs";
import path from "node:path";

import { describe, expect, it } from "vitest";

import { rememberTerms, singerTerms, whiteAccelerationTerms } from "./transition-terms";
import { makeSmootherNodes, TwoAxisSmoother } from "./two-axis-smoother";

type RtsCase = {
  id: string;
  z: (number | null)[];
  dt: number[];
  q_spectral_density: number;
  r_variance: number;
  x0: [number, number];
  P0: [[number, number], [number, number]];
  smoothed: [number, number][];
  smoothed_var: [number, number][];
};

const signals = JSON.parse(
  readFileSync(path.resolve(import.meta.dirname, "../../fixtures/checks/signals.json"), "utf8"),
) as { rts: { cases: RtsCase[] } };

function nodesOf(c: RtsCase) {
  const nodes = makeSmootherNodes(c.z.length);
  nodes.count = c.z.length;
  nodes.velocityVariance.fill(NaN);
  let time = 0;
  c.z.forEach((z, i) => {
    time += i > 0 ? (c.dt[i - 1] ?? NaN) : 0;
    nodes.timeS[i] = time;
    nodes.xM[i] = z ?? NaN;
    nodes.yM[i] = -(z ?? NaN);
  });
  return nodes;
}

describe("the smoother against the published recursion", () => {
  // Source: Rauch, Tung and Striebel (1965) computed by numpy and by one joint least-squares solution, which agree to
  // 1e-13 (fixtures/checks/signals.json, block rts). Tolerance 1e-9: rounding of some hundred operations on numbers of order 10.
  it.each(signals.rts.cases)("$id gives the reference states and variances on both axes", (c) => {
    const smoother = new TwoAxisSmoother({
      capacity: c.z.length,
      terms: rememberTerms((stepS) => whiteAccelerationTerms(stepS, c.q_spectral_density)),
      positionVariance: c.r_variance,
    });
    const [x, v] = c.x0;
    smoother.start({
      xM: x,
      vxMps: v,
      yM: -x,
      vyMps: -v,
      variances: [c.P0[0][0], c.P0[1][1], 0, 0, 0],
    });
    const out = smoother.run(nodesOf(c));
    c.smoothed.forEach(([position, velocity], i) => {
      expect(out.xM[i]).toBeCloseTo(position, 9);
      expect(out.vxMps[i]).toBeCloseTo(velocity, 9);
      expect(out.yM[i]).toBeCloseTo(-position, 9);
      expect(out.vyMps[i]).toBeCloseTo(-velocity, 9);
      expect(out.positionVariance[i]).toBeCloseTo(c.smoothed_var[i]?.[0] ?? NaN, 9);
      expect(out.velocityVariance[i]).toBeCloseTo(c.smoothed_var[i]?.[1] ?? NaN, 9);
    });
  });

  it("gives the same states in two pieces as in one when the second takes up the filter where the first was", () => {
    const model = {
      acceleration: { sd: 0.8, timeS: 2 },
      fastError: { sd: 0.6, timeS: 3 },
      slowError: { sd: 1.7, timeS: 45 },
    };
    const count = 400;
    const make = () =>
      new TwoAxisSmoother({ capacity: count, terms: (s) => singerTerms(s, model), positionVariance: 0.04 });
    const all = makeSmootherNodes(count);
    all.count = count;
    all.velocityVariance.fill(NaN);
    for (let i = 0; i < count; i++) {
      all.timeS[i] = i;
      all.xM[i] = 5 * i + Math.sin(i * 1.7);
      all.yM[i] = 40 * Math.sin(i / 30);
    }
    const prior = { xM: 0, yM: 0, vxMps: 0, vyMps: 0, variances: [25, 100, 0.64, 0.36, 3] as const };
    const whole = make();
    whole.start({ ...prior, variances: [...prior.variances] });
    const expected = Array.from(whole.run(all).vxMps);

    const pieces = make();
    pieces.start({ ...prior, variances: [...prior.variances] });
    const first = { ...all, count: 300 };
    pieces.run(first);
    pieces.continueFrom(150);
    const second = makeSmootherNodes(count);
    second.count = 250;
    second.velocityVariance.fill(NaN);
    for (const key of ["timeS", "xM", "yM"] as const) second[key].set(all[key].subarray(150, 400));
    const got = pieces.run(second).vxMps;
    // Same numbers through the same operations: only the order of the backward sums is shared, so to rounding.
    for (let i = 0; i < 250; i++) expect(got[i]).toBeCloseTo(expected[150 + i] ?? NaN, 9);
  });
});
