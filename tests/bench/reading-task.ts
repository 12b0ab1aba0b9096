import fs from "node:fs";
import { gpx } from "@tmcw/togeojson";
import { DOMParser } from "@xmldom/xmldom";
import { SaxesParser } from "saxes";
import { readFile } from "@/lib/formats/read-file";

/** What a child process measured: the best of its rounds, and what it took at most above its own start. */
export type Measured = { ms: number; cpuMs: number; fixes: number; rssMb: number };

type Task = (file: string) => Promise<number> | number;

const PIECE = 256 * 1024;

/** Like the worker does it: from the file as it streams by. */
async function ours(file: string): Promise<number> {
  const [outcome] = await readFile(fs.createReadStream(file, { highWaterMark: PIECE }), { fileName: file });
  if (outcome?.kind !== "read") throw new Error(JSON.stringify(outcome));
  return outcome.fixes.count;
}

/** The parser alone, in its quickest setting, counting points and nothing else. */
function saxes(file: string): number {
  let points = 0;
  const parser = new SaxesParser({ xmlns: false, position: false });
  parser.on("opentag", (tag) => {
    if (tag.name === "trkpt") points++;
  });
  parser.on("text", () => undefined);
  parser.on("closetag", () => undefined);
  const text = fs.readFileSync(file, "utf8");
  for (let at = 0; at < text.length; at += PIECE) parser.write(text.slice(at, at + PIECE));
  parser.close();
  return points;
}

function wholeDom(file: string): number {
  const document = new DOMParser().parseFromString(fs.readFileSync(file, "utf8"), "text/xml");
  const [feature] = gpx(document as unknown as Document).features;
  return feature?.geometry.type === "LineString" ? feature.geometry.coordinates.length : 0;
}

const TASKS: Readonly<Record<string, Task>> = { ours, saxes, wholeDom };

async function main(): Promise<void> {
  const [name = "", file = "", rounds = "1"] = process.argv.slice(2);
  const task = TASKS[name];
  if (task === undefined) throw new Error(`no task ${name}`);
  const before = process.memoryUsage().rss;
  let best = Number.POSITIVE_INFINITY;
  let bestCpu = Number.POSITIVE_INFINITY;
  let fixes = 0;
  for (let round = 0; round < Number(rounds); round++) {
    const started = performance.now();
    const cpu = process.cpuUsage();
    fixes = await task(file);
    best = Math.min(best, performance.now() - started);
    const { user, system } = process.cpuUsage(cpu);
    bestCpu = Math.min(bestCpu, (user + system) / 1000);
  }
  const peakMb = process.resourceUsage().maxRSS / 1024 - before / 1024 / 1024;
  const measured: Measured = { ms: best, cpuMs: bestCpu, fixes, rssMb: peakMb };
  process.stdout.write(JSON.stringify(measured));
}

await main();
