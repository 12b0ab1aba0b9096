import { describe, expect, it } from "vitest";
import { FixColumns } from "./fix-columns";

describe("FixColumns", () => {
  it("keeps every value in order across blocks and gives all columns one length", () => {
    const columns = new FixColumns();
    const count = 20_001;
    for (let row = 0; row < count; row++) {
      columns.append(row * 1000, row / 1000, -row / 1000);
      if (row % 3 === 0) columns.set("heartRateBpm", row, 100 + (row % 50));
    }
    const fixes = columns.finish();
    expect([fixes.count, fixes.timeMs.length, fixes.heartRateBpm?.length]).toEqual([count, count, count]);
    expect(fixes.timeMs[20_000]).toBe(20_000_000);
    expect(fixes.lonDeg[8192]).toBe(-8.192);
    expect(fixes.heartRateBpm?.[9999]).toBe(149);
    expect(fixes.heartRateBpm?.[10_000]).toBeNaN();
    expect(fixes.elevationM).toBeNull();
  });

  it("fills an optional column that ends before the track does", () => {
    const columns = new FixColumns();
    for (let row = 0; row < 9000; row++) columns.append(row, 0, 0);
    columns.set("hdop", 1, 0.7);
    const { hdop } = columns.finish();
    expect([hdop?.length, hdop?.[0], hdop?.[1], hdop?.[8999]]).toEqual([9000, Number.NaN, 0.7, Number.NaN]);
  });

  it("lets segments without a row vanish and moves starts when rows are left out", () => {
    const columns = new FixColumns();
    columns.startSegment();
    columns.startSegment();
    for (let row = 0; row < 3; row++) columns.append(row, 1, 1);
    columns.startSegment();
    columns.append(3, 1, 1);
    columns.startSegment();
    columns.append(4, 1, 1);
    const fixes = columns.finish(Uint8Array.from([1, 0, 0, 1, 0]));
    expect([...fixes.timeMs]).toEqual([1, 2, 4]);
    expect([...fixes.segmentStarts]).toEqual([0, 2]);
  });

  it("is empty after the track was taken", () => {
    const columns = new FixColumns();
    columns.append(0, 0, 0);
    columns.finish();
    expect(columns.finish().count).toBe(0);
    expect([...columns.finish().segmentStarts]).toEqual([]);
  });
});
