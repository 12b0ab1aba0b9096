import { env } from "@/lib/server/env/env";
import { basemapArchive, basemapBuildShare } from "./basemap";

/**
 * What the map has for a background. ready: the coastline is on the server. preparing: it is being cut.
 * missing: it is not there and nobody is cutting it. external: the operator has set a style of their own.
 */
export type BasemapStatus =
  | { readonly state: "ready"; readonly stamp: string; readonly maxZoom: number }
  | { readonly state: "preparing"; readonly share: number }
  | { readonly state: "missing" }
  | { readonly state: "external"; readonly styleUrl: string };

/** Looks; costs one file look-up once the archive is open. */
export async function basemapStatus(nowMs: number): Promise<BasemapStatus> {
  const { mapStyleUrl } = env();
  if (mapStyleUrl !== null) return { state: "external", styleUrl: mapStyleUrl };
  const archive = await basemapArchive();
  if (archive !== null) return { state: "ready", stamp: archive.stamp, maxZoom: archive.maxZoom };
  const share = await basemapBuildShare(nowMs);
  return share === null ? { state: "missing" } : { state: "preparing", share };
}
