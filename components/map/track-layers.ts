import type { LayerProps } from "react-map-gl/maplibre";
import { SPEED_BANDS, speedRamp } from "@/lib/display/speed-ramp";
import { type Theme, themeTokens } from "@/lib/display/theme-tokens";
import { at } from "@/lib/errors/invariant";
import { bandWidthPx } from "./band-width";
import { OFF_FOIL } from "./track-runs";

type LineLayer = Extract<LayerProps, { type: "line" }>;
type CircleLayer = Extract<LayerProps, { type: "circle" }>;

/** How closely a track is drawn: from afar means over a stretch of it, near every sample's own speed. */
export type Detail = {
  readonly name: string;
  readonly minzoom: number;
  readonly maxzoom: number;
  readonly meanOverM: number;
  readonly toleranceM: number;
};

/** At zoom 11.5 a pixel is 15 m at 57 degrees, at 13.5 it is 4 m: a mean covers a dozen pixels or more. */
export const DETAILS: readonly Detail[] = [
  { name: "far", minzoom: 0, maxzoom: 11.5, meanOverM: 300, toleranceM: 6 },
  { name: "middle", minzoom: 11.5, maxzoom: 13.5, meanOverM: 80, toleranceM: 2.5 },
  { name: "near", minzoom: 13.5, maxzoom: 24, meanOverM: 12, toleranceM: 1 },
];

/** receding: what lies outside the stretch picked out, one thin line without colours. */
export type TrackLook = { readonly receding: boolean; readonly detail: Detail };

/** The track as line layers, bottom to top: a rim that parts it from the land, off foil, speed bands. */
export function trackLayers(theme: Theme, source: string, look: TrackLook): LineLayer[] {
  const { receding } = look;
  const { minzoom, maxzoom } = look.detail;
  const tokens = themeTokens(theme);
  const ramp = speedRamp(theme);
  const bands = Array.from({ length: SPEED_BANDS }, (_, band) => band);
  const byBand = (value: (band: number) => string | number) => [
    "match",
    ["get", "kind"],
    ...bands.flatMap((band) => [band, value(band)]),
    value(0),
  ];
  const width = (extra: number) => byBand((band) => bandWidthPx(band) + extra);
  // Built by code, so typed by hand: the expression types of the style specification list literals only.
  const expression = (value: unknown[]) => value as unknown as number;
  const colour = (value: unknown[]) => value as unknown as string;
  return [
    {
      id: `${source}-rim`,
      type: "line",
      source,
      minzoom,
      maxzoom,
      filter: [">=", ["get", "kind"], 0],
      layout: { "line-join": "round", "line-cap": "round" },
      paint: {
        "line-color": tokens.sheet,
        "line-width": receding ? 0 : expression(width(2)),
        "line-opacity": receding ? 0 : 0.8,
      },
    },
    {
      id: `${source}-off-foil`,
      type: "line",
      source,
      minzoom,
      maxzoom,
      filter: ["==", ["get", "kind"], OFF_FOIL],
      layout: { "line-join": "round" },
      paint: {
        "line-color": tokens.muted,
        "line-width": 1.5,
        "line-dasharray": [2, 2],
      },
    },
    {
      id: `${source}-bands`,
      type: "line",
      source,
      minzoom,
      maxzoom,
      filter: [">=", ["get", "kind"], 0],
      layout: { "line-join": "round", "line-cap": "round", "line-sort-key": ["get", "kind"] },
      paint: {
        "line-color": receding ? tokens.muted : colour(byBand((band) => at(ramp, band))),
        "line-width": receding ? 1.25 : expression(width(0)),
      },
    },
  ];
}

/** The first sample as an open ring, the last as a filled one. */
export function endLayers(theme: Theme): CircleLayer[] {
  const tokens = themeTokens(theme);
  const ring = (end: "first" | "last", fill: string): CircleLayer => ({
    id: `ends-${end}`,
    type: "circle",
    source: "ends",
    filter: ["==", ["get", "end"], end],
    paint: {
      "circle-radius": 4.5,
      "circle-color": fill,
      "circle-stroke-color": tokens.ink,
      "circle-stroke-width": 2,
    },
  });
  return [ring("first", tokens.sheet), ring("last", tokens.ink)];
}
