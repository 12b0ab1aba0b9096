import { describe, expect, it } from "vitest";
import { brushedStretch, pxOfTime, timeAtPx, type TimeAxis } from "./time-axis";

const axis: TimeAxis = { startMs: 100_000, endMs: 200_000, leftPx: 40, rightPx: 240 };

describe("the time axis", () => {
  it("maps its ends to its edges and back", () => {
    expect([pxOfTime(axis, 100_000), pxOfTime(axis, 200_000), pxOfTime(axis, 150_000)]).toEqual([
      40, 240, 140,
    ]);
    expect([timeAtPx(axis, 40), timeAtPx(axis, 240), timeAtPx(axis, 140)]).toEqual([
      100_000, 200_000, 150_000,
    ]);
  });

  it("holds a pointer that leaves the drawing at its ends", () => {
    expect([timeAtPx(axis, -500), timeAtPx(axis, 900)]).toEqual([100_000, 200_000]);
  });

  it("brushes in either direction and takes a small drag for a click", () => {
    expect(brushedStretch(axis, 140, 60)).toEqual({ startMs: 110_000, endMs: 150_000 });
    expect(brushedStretch(axis, 60, 140)).toEqual({ startMs: 110_000, endMs: 150_000 });
    expect(brushedStretch(axis, 100, 103)).toBeNull();
    expect(brushedStretch({ ...axis, endMs: 100_500 }, 40, 240)).toBeNull();
  });
});
