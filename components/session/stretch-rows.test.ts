import { describe, expect, it } from "vitest";
import { stretchAt } from "./stretch-rows";

const STRETCHES = [
  { startMs: 1000, endMs: 2000 },
  { startMs: 5000, endMs: 6000 },
  { startMs: 6500, endMs: 9000 },
];

describe("stretchAt", () => {
  it.each([
    [null, -1],
    [999, -1],
    [1000, 0],
    [2000, 0],
    [3000, -1],
    [5500, 1],
    [6250, -1],
    [9000, 2],
    [9001, -1],
  ])("finds the row of moment %s", (timeMs, row) => {
    expect(stretchAt(STRETCHES, timeMs)).toBe(row);
  });

  it("finds nothing in an empty table", () => {
    expect(stretchAt([], 5)).toBe(-1);
  });
});
