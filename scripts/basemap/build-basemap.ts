import { mkdir, readdir, rm, stat, writeFile } from "node:fs/promises";
import { createRequire } from "node:module";
import path from "node:path";
import { LAND_ATTRIBUTION } from "@/lib/display/land-attribution";
import { ArchiveWriter } from "./archive-writer";
import { claimBuild } from "./build-claim";
import { cutLand, MAX_ZOOM } from "./cut-land";
import { LAND_LAYER } from "./encode-tile";
import { readLand } from "./read-land";
import { tidyLand } from "./tidy-land";

export type BuildReport =
  | { readonly outcome: "there" }
  | { readonly outcome: "elsewhere" }
  | {
      readonly outcome: "built";
      readonly tiles: number;
      readonly distinct: number;
      readonly bytes: number;
      readonly seconds: number;
    };

export type BuildRequest = {
  readonly archive: string;
  readonly progressFile: string;
  /** Land as GeoJSON; the npm package's file unless a test gives its own. */
  readonly land?: string;
  readonly maxZoom?: number;
  readonly say?: (line: string) => void;
};

/**
 * Builds the archive of land tiles unless it is there ("there") or another process is at it ("elsewhere").
 * The archive appears under its name only when it is whole; what dead builds left behind is cleared away.
 */
export async function buildBasemap(request: BuildRequest): Promise<BuildReport> {
  const { archive, progressFile, maxZoom = MAX_ZOOM, say = () => undefined } = request;
  if (await isFile(archive)) return { outcome: "there" };
  await mkdir(path.dirname(archive), { recursive: true });
  const claim = await claimBuild(progressFile);
  if (claim === null) return { outcome: "elsewhere" };
  const started = performance.now();
  try {
    await clearLeftovers(archive);
    say("Reading the land of the world.");
    const land = tidyLand(await readLand(request.land ?? landFile()));
    const writer = new ArchiveWriter();
    let lastTenth = 0;
    const progress = async (share: number) => {
      await writeFile(progressFile, claim.text(share));
      const tenth = Math.floor(share * 10);
      if (tenth > lastTenth) say(`Cutting the coastline into tiles: ${tenth * 10} %.`);
      lastTenth = tenth;
    };
    await cutLand(land, (tile) => writer.add(tile.z, tile.x, tile.y, tile.data), { maxZoom, progress });
    const bytes = await writer.write(archive, metadata(maxZoom));
    const seconds = (performance.now() - started) / 1000;
    return { outcome: "built", tiles: writer.tileCount, distinct: writer.contentCount, bytes, seconds };
  } finally {
    await claim.release();
  }
}

function landFile(): string {
  return createRequire(import.meta.url).resolve("@geo-maps/earth-lands-100m/map.geo.json");
}

function metadata(maxZoom: number): Readonly<Record<string, unknown>> {
  return {
    name: "Land",
    description: "Land of the world, accurate to 100 m, for a quiet background under tracks.",
    attribution: LAND_ATTRIBUTION,
    vector_layers: [{ id: LAND_LAYER, fields: {}, minzoom: 0, maxzoom: maxZoom }],
  };
}

async function isFile(file: string): Promise<boolean> {
  return stat(file).then(
    (found) => found.isFile(),
    () => false,
  );
}

async function clearLeftovers(archive: string): Promise<void> {
  const folder = path.dirname(archive);
  for (const name of await readdir(folder)) {
    const older = /^land-\d+\.pmtiles$/.test(name) && name !== path.basename(archive);
    if (name.endsWith(".part") || older) await rm(path.join(folder, name), { force: true });
  }
}
