import path from "node:path";

/** Raised whenever the cut of the land changes: old archives are then built anew under a new name. */
export const BASEMAP_VERSION = 2;

/** Where the archive of land tiles stands under the data folder. */
export function basemapArchivePath(dataDir: string): string {
  return path.join(dataDir, "basemap", `land-${BASEMAP_VERSION}.pmtiles`);
}

/** Where a running build says how far it is; the file is gone when no build runs. */
export function basemapProgressPath(dataDir: string): string {
  return `${basemapArchivePath(dataDir)}.progress`;
}
