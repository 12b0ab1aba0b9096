import { at } from "@/lib/errors/invariant";
import type { Bounds } from "./track-shape";

/** Spacings of charts, minutes of arc: whole parts of a degree. Source: common practice, no source. */
const STEPS_MIN = [1, 2, 5, 10, 30, 60, 300, 600];

export type Graticule = {
  readonly lines: GeoJSON.FeatureCollection<GeoJSON.MultiLineString>;
  /** Minutes of arc between lines. */
  readonly stepMin: number;
};

/** Lines of latitude and longitude round a track: four or so across its longer side, well beyond its ends. */
export function graticule(bounds: Bounds): Graticule {
  const [west, south, east, north] = bounds;
  const spanMin = 60 * Math.max(east - west, north - south, 1 / 60);
  const stepMin = STEPS_MIN.find((step) => spanMin / step <= 5) ?? at(STEPS_MIN, STEPS_MIN.length - 1);
  const step = stepMin / 60;
  const beyond = (3 * spanMin) / 60;
  const low = Math.max(-85, south - beyond);
  const high = Math.min(85, north + beyond);
  const coordinates: GeoJSON.Position[][] = [];
  for (let k = Math.ceil((west - beyond) / step); k * step <= east + beyond; k += 1) {
    coordinates.push([
      [k * step, low],
      [k * step, high],
    ]);
  }
  for (let k = Math.ceil(low / step); k * step <= high; k += 1) {
    coordinates.push([
      [west - beyond, k * step],
      [east + beyond, k * step],
    ]);
  }
  const feature = {
    type: "Feature" as const,
    properties: {},
    geometry: { type: "MultiLineString" as const, coordinates },
  };
  return { stepMin, lines: { type: "FeatureCollection", features: [feature] } };
}
