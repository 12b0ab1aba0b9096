import { at } from "@/lib/errors/invariant";
import { type RunOptions, trackRuns } from "./track-runs";
import type { TrackShape } from "./track-shape";

export type TrackFeatures = GeoJSON.FeatureCollection<GeoJSON.MultiLineString, { readonly kind: number }>;

/** The runs of a track as one feature per colour, for a map. Coordinates to 1e-6 degrees (0.1 m). */
export function trackFeatures(shape: TrackShape, options: RunOptions): TrackFeatures {
  const lines = new Map<number, GeoJSON.Position[][]>();
  for (const run of trackRuns(shape, options)) {
    const line = run.samples.map((i): GeoJSON.Position => [
      Math.round(at(shape.lonDeg, i) * 1e6) / 1e6,
      Math.round(at(shape.series.latDeg, i) * 1e6) / 1e6,
    ]);
    const list = lines.get(run.kind);
    if (list) list.push(line);
    else lines.set(run.kind, [line]);
  }
  const features = [...lines.entries()]
    .sort(([a], [b]) => a - b)
    .map(([kind, coordinates]): GeoJSON.Feature<GeoJSON.MultiLineString, { readonly kind: number }> => ({
      type: "Feature",
      properties: { kind },
      geometry: { type: "MultiLineString", coordinates },
    }));
  return { type: "FeatureCollection", features };
}
