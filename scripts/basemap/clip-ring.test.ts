import { describe, expect, it } from "vitest";
import { clipRing, type Ring } from "./clip-ring";

/** Shoelace formula (C. F. Gauss, 1795); the sign is the ring's sense. */
function area(ring: Ring): number {
  let twice = 0;
  for (let i = 0; i + 3 < ring.length; i += 2) {
    twice += (ring[i] ?? 0) * (ring[i + 3] ?? 0) - (ring[i + 2] ?? 0) * (ring[i + 1] ?? 0);
  }
  return twice / 2;
}

const unit = { west: 0, south: 0, east: 1, north: 1 };

describe("clipRing", () => {
  it("keeps the overlap of a square and the box, to the area", () => {
    const kept = clipRing([0.5, 0.5, 2, 0.5, 2, 2, 0.5, 2, 0.5, 0.5], unit);
    expect(kept && area(kept)).toBeCloseTo(0.25, 12);
  });

  it("gives the whole box inside land that surrounds it", () => {
    const kept = clipRing([-9, -9, 9, -9, 9, 9, -9, 9, -9, -9], unit);
    expect(kept && area(kept)).toBe(1);
  });

  it("keeps the area of a concave ring whose inside is cut in two", () => {
    // A U whose arms, each 0.25 wide, reach into the box from below: two pieces of 0.25 x 0.5.
    const arms = [0, -1, 1, -1, 1, 0.5, 0.75, 0.5, 0.75, -0.5, 0.25, -0.5, 0.25, 0.5, 0, 0.5, 0, -1];
    const kept = clipRing(arms, unit);
    expect(kept && area(kept)).toBeCloseTo(0.25, 12);
  });

  it("closes what it keeps and leaves nothing of a ring outside", () => {
    const kept = clipRing([-1, -1, 0.5, -1, 0.5, 0.5, -1, -1], unit) ?? [];
    expect([kept[0], kept[1]]).toEqual([kept[kept.length - 2], kept[kept.length - 1]]);
    expect(clipRing([2, 2, 3, 2, 3, 3, 2, 2], unit)).toBeNull();
  });

  it("puts cut positions exactly on the side", () => {
    const kept = clipRing([0.1, 0.1, 1.7, 0.3, 0.1, 0.9, 0.1, 0.1], unit) ?? [];
    expect([...Array.from(kept)].filter((value) => value > 1)).toEqual([]);
    expect([...Array.from(kept)].filter((value) => value === 1)).toHaveLength(2);
  });
});
