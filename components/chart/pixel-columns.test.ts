import { describe, expect, it } from "vitest";
import { pixelColumns } from "./pixel-columns";

describe("pixelColumns", () => {
  it("keeps the least and the most of every column", () => {
    const { least, most } = pixelColumns([1, 5, 2, -3, 0, 9], { from: 0, to: 6, width: 3 });
    expect([...least]).toEqual([1, -3, 0]);
    expect([...most]).toEqual([5, 2, 9]);
  });

  it("loses no peak of a long series at any width", () => {
    const values = new Float32Array(100_000);
    values[77_777] = 42;
    values[12_345] = -42;
    for (const width of [1, 7, 360, 1280]) {
      const { least, most } = pixelColumns(values, { from: 0, to: values.length, width });
      expect(Math.max(...most)).toBe(42);
      expect(Math.min(...least)).toBe(-42);
    }
  });

  it("leaves gaps as gaps and takes only the samples of the range", () => {
    const { least } = pixelColumns([1, Number.NaN, Number.NaN, 4], { from: 0, to: 4, width: 4 });
    expect([...least].map(Number.isNaN)).toEqual([false, true, true, false]);
    expect([...pixelColumns([9, 1, 2, 9], { from: 1, to: 3, width: 1 }).most]).toEqual([2]);
  });

  it("answers an empty range and no width with empty columns", () => {
    expect(pixelColumns([1], { from: 1, to: 1, width: 2 }).least).toHaveLength(2);
    expect(pixelColumns([], { from: 0, to: 0, width: 0 }).least).toHaveLength(0);
  });
});
