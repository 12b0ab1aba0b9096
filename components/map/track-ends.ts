import { at } from "@/lib/errors/invariant";
import type { TrackShape } from "./track-shape";

type End = { readonly end: "first" | "last" };

/** Where the drawn track begins and ends, as two points. */
export function trackEnds(shape: TrackShape): GeoJSON.FeatureCollection<GeoJSON.Point, End> {
  const first = shape.drawn.indexOf(1);
  const last = shape.drawn.lastIndexOf(1);
  const point = (sample: number, end: End["end"]): GeoJSON.Feature<GeoJSON.Point, End> => ({
    type: "Feature",
    properties: { end },
    geometry: { type: "Point", coordinates: [at(shape.lonDeg, sample), at(shape.series.latDeg, sample)] },
  });
  return {
    type: "FeatureCollection",
    features: first < 0 ? [] : [point(first, "first"), point(last, "last")],
  };
}
