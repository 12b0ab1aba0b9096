/** A box in degrees. */
export type Box = {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
};

/** A closed ring as flat lon, lat pairs; first position = last. */
export type Ring = ArrayLike<number>;

/** The smallest box around a ring. */
export function boxOf(ring: Ring): Box {
  let west = Infinity;
  let south = Infinity;
  let east = -Infinity;
  let north = -Infinity;
  for (let i = 0; i + 1 < ring.length; i += 2) {
    const lon = ring[i] ?? 0;
    const lat = ring[i + 1] ?? 0;
    if (lon < west) west = lon;
    if (lon > east) east = lon;
    if (lat < south) south = lat;
    if (lat > north) north = lat;
  }
  return { west, south, east, north };
}

export function boxesMeet(a: Box, b: Box): boolean {
  return a.west <= b.east && a.east >= b.west && a.south <= b.north && a.north >= b.south;
}

export function boxHolds(outer: Box, inner: Box): boolean {
  return (
    inner.west >= outer.west &&
    inner.east <= outer.east &&
    inner.south >= outer.south &&
    inner.north <= outer.north
  );
}

/**
 * The part of a ring inside a box, by clipping against its four sides in turn (I. Sutherland and
 * G. Hodgman, 1974, "Reentrant polygon clipping", CACM 17(1)). Parts of a concave ring stay joined along
 * the box's sides, which filling does not see. Null when nothing with an area is left.
 */
export function clipRing(ring: Ring, box: Box): Ring | null {
  let kept = clipSide(ring, 0, box.west, 1);
  kept = clipSide(kept, 0, box.east, -1);
  kept = clipSide(kept, 1, box.south, 1);
  kept = clipSide(kept, 1, box.north, -1);
  return kept.length >= 8 ? kept : null;
}

/** Keeps what lies on the side of `limit` that `sign` points to, along axis 0 (lon) or 1 (lat). */
function clipSide(ring: Ring, axis: 0 | 1, limit: number, sign: 1 | -1): number[] {
  const kept: number[] = [];
  for (let i = 0; i + 3 < ring.length; i += 2) {
    const lonA = ring[i] ?? 0;
    const latA = ring[i + 1] ?? 0;
    const lonB = ring[i + 2] ?? 0;
    const latB = ring[i + 3] ?? 0;
    const a = ((axis === 0 ? lonA : latA) - limit) * sign;
    const b = ((axis === 0 ? lonB : latB) - limit) * sign;
    if (a >= 0) kept.push(lonA, latA);
    if (a >= 0 !== b >= 0) {
      const share = a / (a - b);
      // The clipped coordinate is set, not computed, so that neighbouring cells meet exactly.
      kept.push(
        axis === 0 ? limit : lonA + (lonB - lonA) * share,
        axis === 1 ? limit : latA + (latB - latA) * share,
      );
    }
  }
  if (kept.length > 0) kept.push(kept[0] ?? 0, kept[1] ?? 0);
  return kept;
}
