import { z } from "zod";
import { themeTokens } from "@/lib/display/theme-tokens";
import { LAND_ATTRIBUTION } from "@/lib/display/land-attribution";
import { AppError } from "@/lib/errors/app-error";
import type { BasemapStatus } from "./status";

const themeSchema = z.enum(["light", "dark"]);
const COASTLINE = { light: "#a08f6c", dark: "#6b7d72" } as const;

/**
 * The background of the map as a MapLibre style (style specification, version 8): water, and land with its
 * coastline once the archive is there. It names no other server, no glyphs and no sprites.
 *
 * @throws AppError `validation` for a theme that does not exist.
 */
export function basemapStyle(theme: string, status: BasemapStatus): Record<string, unknown> {
  const parsed = themeSchema.safeParse(theme);
  if (!parsed.success) throw new AppError("validation", "The theme must be light or dark.");
  const colours = themeTokens(parsed.data);
  const water = { id: "water", type: "background", paint: { "background-color": colours.water } };
  const head = {
    version: 8,
    name: `Trimwake ${parsed.data}`,
    metadata: { "trimwake:basemap": status.state },
  };
  if (status.state !== "ready") return { ...head, sources: {}, layers: [water] };
  return {
    ...head,
    sources: {
      land: {
        type: "vector",
        tiles: [`/api/map/tiles/${status.stamp}/{z}/{x}/{y}`],
        minzoom: 0,
        maxzoom: status.maxZoom,
        attribution: LAND_ATTRIBUTION,
      },
    },
    layers: [
      water,
      {
        id: "land",
        type: "fill",
        source: "land",
        "source-layer": "land",
        paint: { "fill-color": colours.land },
      },
      {
        id: "coastline",
        type: "line",
        source: "land",
        "source-layer": "land",
        layout: { "line-join": "round" },
        paint: {
          "line-color": COASTLINE[parsed.data],
          "line-width": ["interpolate", ["linear"], ["zoom"], 3, 0.4, 8, 0.8, 14, 1.4],
        },
      },
    ],
  };
}
