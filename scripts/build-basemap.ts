/**
 * npm-less command: `tsx scripts/build-basemap.ts [--out FILE]` cuts the world's land into the archive of tiles
 * the map reads. Without --out it goes to the data folder. A second run finds it there and ends at once.
 */
import os from "node:os";
import path from "node:path";
import process from "node:process";
import { parseArgs } from "node:util";
import { basemapArchivePath, basemapProgressPath } from "@/lib/server/basemap/archive-path";
import { env } from "@/lib/server/env/env";
import { buildBasemap } from "./basemap/build-basemap";

async function main(): Promise<void> {
  const { values } = parseArgs({ options: { out: { type: "string" } } });
  const archive = values.out ? path.resolve(values.out) : basemapArchivePath(env().dataDir);
  const progressFile = values.out ? `${archive}.progress` : basemapProgressPath(env().dataDir);
  // A server may be answering beside this: it goes first.
  os.setPriority(os.constants.priority.PRIORITY_LOW);
  for (const signal of ["SIGINT", "SIGTERM"] as const) process.on(signal, () => process.exit(130));
  const report = await buildBasemap({ archive, progressFile, say: (line) => console.log(line) });
  if (report.outcome === "there") return;
  if (report.outcome === "elsewhere") {
    console.log("The coastline is being prepared by another process.");
    return;
  }
  const megabytes = (report.bytes / 1e6).toFixed(1);
  const peak = (process.resourceUsage().maxRSS / 1024).toFixed(0);
  console.log(
    `The coastline is ready: ${report.tiles} tiles (${report.distinct} distinct), ${megabytes} MB, ` +
      `${report.seconds.toFixed(1)} s, peak memory ${peak} MiB.`,
  );
}

main().catch((error: unknown) => {
  console.error(`The coastline could not be prepared: ${error instanceof Error ? error.message : error}`);
  process.exitCode = 1;
});
