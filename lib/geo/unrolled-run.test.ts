import { describe, expect, it } from "vitest";
import { metresPerDegreeEast, metresPerDegreeNorth } from "./ellipsoid";
import { unrolledRun } from "./unrolled-run";

/** A path of points given in metres east and north of 57° N 9° E. */
function pathOf(points: readonly (readonly [number, number])[]) {
  const latDeg = points.map(([, north]) => 57 + north / metresPerDegreeNorth(57));
  const lonDeg = points.map(([east]) => 9 + east / metresPerDegreeEast(57));
  return { latDeg, lonDeg, first: 0, end: points.length };
}

describe("unrolledRun", () => {
  it("lays a straight run on its line with its length along and nothing aside", () => {
    const run = unrolledRun(pathOf([0, 1, 2, 3, 4].map((i) => [i * 60, i * 80])));
    expect(run.kind).toBe("line");
    // 3-4-5 triangle: 100 m a step at 36.87° from north; 0.1 m for the change of radii over 320 m.
    expect(Math.abs(run.alongMaxM - 400)).toBeLessThan(0.1);
    expect(Math.max(run.asideMaxM, -run.asideMinM)).toBeLessThan(0.1);
    expect(run.bearingDeg).toBeCloseTo((Math.atan2(3, 4) * 180) / Math.PI, 1);
  });

  it("counts an offset to the right of travel as positive", () => {
    const run = unrolledRun(
      pathOf([
        [0, 0],
        [50, 500],
        [0, 1000],
      ]),
    );
    expect(run.asideM[1]).toBeCloseTo(50, 1);
    expect(run.alongM[1]).toBeCloseTo(500, 0);
  });

  it("lays an out-and-back session along its greatest spread", () => {
    const run = unrolledRun(
      pathOf([
        [0, 0],
        [400, 0],
        [800, 10],
        [400, 20],
        [5, 0],
      ]),
    );
    expect(run.kind).toBe("axis");
    expect(run.alongMaxM - run.alongMinM).toBeGreaterThan(790);
    expect(run.asideMaxM - run.asideMinM).toBeLessThan(25);
  });

  it("gives empty columns for an empty range and zeros for one point", () => {
    expect(unrolledRun({ latDeg: [], lonDeg: [], first: 0, end: 0 }).alongM).toHaveLength(0);
    expect([...unrolledRun(pathOf([[0, 0]])).alongM]).toEqual([0]);
  });

  it("crosses the antimeridian in one piece", () => {
    const run = unrolledRun({ latDeg: [0, 0, 0], lonDeg: [179.999, 180, -179.999], first: 0, end: 3 });
    // 0.002° of the equator: 2 x 111.32 m.
    expect(run.alongMaxM).toBeCloseTo(222.64, 1);
  });
});
