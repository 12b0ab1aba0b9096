import { chainedPlane } from "./chained-plane";

/** A track laid along its own line; columns have one entry per sample from `first` on. */
export type UnrolledRun = {
  /** line: from the first to the last position. axis: out and back, along the direction of greatest spread. */
  readonly kind: "line" | "axis";
  readonly first: number;
  readonly alongM: Float64Array;
  /** Positive to the right of the direction of travel. */
  readonly asideM: Float64Array;
  readonly alongMinM: number;
  readonly alongMaxM: number;
  readonly asideMinM: number;
  readonly asideMaxM: number;
  readonly bearingDeg: number;
};

/** Net displacement below this share of the way's extent counts as out and back. */
const LINE_SHARE_MIN = 0.5;

/** Direction of greatest spread of the points (first principal axis), radians from north. */
function principalAxis(xM: Float64Array, yM: Float64Array): number {
  const n = xM.length;
  let meanX = 0;
  let meanY = 0;
  for (let i = 0; i < n; i += 1) {
    meanX += (xM[i] ?? 0) / n;
    meanY += (yM[i] ?? 0) / n;
  }
  let xx = 0;
  let yy = 0;
  let xy = 0;
  for (let i = 0; i < n; i += 1) {
    const dx = (xM[i] ?? 0) - meanX;
    const dy = (yM[i] ?? 0) - meanY;
    xx += dx * dx;
    yy += dy * dy;
    xy += dx * dy;
  }
  return Math.atan2(2 * xy, yy - xx) / 2;
}

function farthestFromStartM(xM: Float64Array, yM: Float64Array): number {
  let most = 0;
  for (let i = 0; i < xM.length; i += 1) most = Math.max(most, Math.hypot(xM[i] ?? 0, yM[i] ?? 0));
  return most;
}

/**
 * Lays samples `first` to `end` (exclusive) of a path along its own line: distance along it and offset to its right,
 * metres from the first sample. When the path ends near where it began, the line is the direction of greatest
 * spread instead. Degrees in, WGS84, antimeridian-safe; an empty range gives empty columns. Positions must be finite.
 * Source: rotation of the local plane; principal axis by Pearson (1901), Phil. Mag. 2, 559-572.
 *
 * @example
 * unrolledRun({ latDeg: [57, 57.001], lonDeg: [9, 9], first: 0, end: 2 }).kind; // "line"
 */
export function unrolledRun(path: {
  latDeg: ArrayLike<number>;
  lonDeg: ArrayLike<number>;
  first: number;
  end: number;
}): UnrolledRun {
  const { first, end } = path;
  const count = Math.max(0, end - first);
  const lat = Float64Array.from({ length: count }, (_, i) => path.latDeg[first + i] ?? 0);
  const lon = Float64Array.from({ length: count }, (_, i) => path.lonDeg[first + i] ?? 0);
  const { xM, yM } = chainedPlane(lat, lon, count);
  const endX = xM[count - 1] ?? 0;
  const endY = yM[count - 1] ?? 0;
  const isLine = Math.hypot(endX, endY) >= LINE_SHARE_MIN * farthestFromStartM(xM, yM);
  const heading = isLine ? Math.atan2(endX, endY) : principalAxis(xM, yM);
  const s = Math.sin(heading);
  const c = Math.cos(heading);
  const alongM = new Float64Array(count);
  const asideM = new Float64Array(count);
  const range = { alongMinM: 0, alongMaxM: 0, asideMinM: 0, asideMaxM: 0 };
  for (let i = 0; i < count; i += 1) {
    const x = xM[i] ?? 0;
    const y = yM[i] ?? 0;
    const along = x * s + y * c;
    const aside = x * c - y * s;
    alongM[i] = along;
    asideM[i] = aside;
    range.alongMinM = Math.min(range.alongMinM, along);
    range.alongMaxM = Math.max(range.alongMaxM, along);
    range.asideMinM = Math.min(range.asideMinM, aside);
    range.asideMaxM = Math.max(range.asideMaxM, aside);
  }
  const bearingDeg = ((heading * 180) / Math.PI + 360) % 360;
  return { kind: isLine ? "line" : "axis", first, alongM, asideM, ...range, bearingDeg };
}
