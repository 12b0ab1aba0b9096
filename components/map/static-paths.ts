import type { SpeedScale } from "@/lib/display/speed-ramp";
import { at } from "@/lib/errors/invariant";
import { trackRuns } from "./track-runs";
import type { TrackShape } from "./track-shape";

export type Frame = { readonly widthPx: number; readonly heightPx: number; readonly marginPx: number };

export type StaticPaths = {
  /** One SVG path per colour, off foil first, then slow to fast. */
  readonly paths: readonly { readonly kind: number; readonly d: string }[];
  readonly first: readonly [number, number];
  readonly last: readonly [number, number];
  readonly metresPerPx: number;
  /** Where a position lies in the frame. */
  place(lonDeg: number, latDeg: number): readonly [number, number];
};

/** Mean radius, for drawing only. Source: IUGG 1980 (R1). */
const EARTH_RADIUS_M = 6371008.8;

/**
 * The track as SVG paths that fill a frame, north up, the same scale both ways. Lines are thinned to what
 * the frame can show. Null when there is nothing to draw.
 */
export function staticPaths(shape: TrackShape, scale: SpeedScale, frame: Frame): StaticPaths | null {
  if (shape.bounds === null) return null;
  const [west, south, east, north] = shape.bounds;
  const middleLat = (south + north) / 2;
  const middleLon = (west + east) / 2;
  const metresNorth = (EARTH_RADIUS_M * Math.PI) / 180;
  const metresEast = metresNorth * Math.cos((middleLat * Math.PI) / 180);
  const metresPerPx = Math.max(
    ((east - west) * metresEast) / (frame.widthPx - 2 * frame.marginPx),
    ((north - south) * metresNorth) / (frame.heightPx - 2 * frame.marginPx),
    // Somebody who stood still is a dot, not a division by nought.
    0.5,
  );
  const tenth = (value: number) => Math.round(value * 10) / 10;
  const place = (lonDeg: number, latDeg: number): readonly [number, number] => [
    tenth(frame.widthPx / 2 + ((lonDeg - middleLon) * metresEast) / metresPerPx),
    tenth(frame.heightPx / 2 - ((latDeg - middleLat) * metresNorth) / metresPerPx),
  ];
  const placeSample = (i: number) => place(at(shape.lonDeg, i), at(shape.series.latDeg, i));
  const parts = new Map<number, string[]>();
  for (const run of trackRuns(shape, { scale, toleranceM: metresPerPx / 2, meanOverM: 12 * metresPerPx })) {
    const d = `M${run.samples.map((i) => placeSample(i).join(" ")).join("L")}`;
    const list = parts.get(run.kind);
    if (list) list.push(d);
    else parts.set(run.kind, [d]);
  }
  return {
    paths: [...parts.entries()].sort(([a], [b]) => a - b).map(([kind, list]) => ({ kind, d: list.join("") })),
    first: placeSample(shape.drawn.indexOf(1)),
    last: placeSample(shape.drawn.lastIndexOf(1)),
    metresPerPx,
    place,
  };
}
