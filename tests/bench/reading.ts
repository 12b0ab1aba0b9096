import { execFileSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import type { Measured } from "./reading-task";

const TASK = path.join(import.meta.dirname, "reading-task.ts");
const START_MS = Date.UTC(2025, 5, 14, 8);

/** A small linear congruential generator (Numerical Recipes, 1992), so that every run has the same file. */
function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** A 10 Hz session as a watch writes it: 347 bytes a fix, so 144,000 fixes make 50 MB. */
function writeTrack(file: string, fixes: number): void {
  const random = randomNumbers(7);
  const out = fs.openSync(file, "w");
  let lat = 57.1;
  let lon = 9.2;
  let text =
    '<?xml version="1.0" encoding="UTF-8"?>\n<gpx version="1.1" creator="bench" xmlns="http://www.topografix.com/GPX/1/1" ' +
    'xmlns:gpxtpx="http://www.garmin.com/xmlschemas/TrackPointExtension/v2">\n  <trk>\n    <trkseg>\n';
  for (let index = 0; index < fixes; index++) {
    lat += (random() - 0.4) * 1e-5;
    lon += (random() - 0.3) * 1e-5;
    text +=
      `      <trkpt lat="${lat.toFixed(9)}" lon="${lon.toFixed(9)}">\n        <ele>${(random() * 3).toFixed(3)}</ele>\n` +
      `        <time>${new Date(START_MS + index * 100).toISOString()}</time>\n        <extensions>\n` +
      `          <gpxtpx:TrackPointExtension>\n            <gpxtpx:hr>${Math.floor(120 + random() * 40)}</gpxtpx:hr>\n` +
      `            <gpxtpx:speed>${(6 + random() * 3).toFixed(3)}</gpxtpx:speed>\n` +
      "          </gpxtpx:TrackPointExtension>\n        </extensions>\n      </trkpt>\n";
    if (text.length > 1_000_000) {
      fs.writeSync(out, text);
      text = "";
    }
  }
  fs.writeSync(out, `${text}    </trkseg>\n  </trk>\n</gpx>\n`);
  fs.closeSync(out);
}

/** One task in a process of its own; the loader of this process is handed on. */
function inChild(task: string, file: string, rounds: number): Measured {
  const flags = [...process.execArgv, "--max-old-space-size=4096"];
  const output = execFileSync(process.execPath, [...flags, TASK, task, file, String(rounds)], {
    encoding: "utf8",
  });
  return JSON.parse(output) as Measured;
}

/** Milliseconds of an outside program, null when it is not there. */
function outside(program: string, args: readonly string[]): number | null {
  const started = performance.now();
  try {
    execFileSync(program, args, { stdio: ["ignore", "ignore", "pipe"] });
  } catch (error) {
    if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
    if (error instanceof Error && /No module named/.test(error.message)) return null;
    throw error;
  }
  return performance.now() - started;
}

const seconds = (ms: number): string => `${(ms / 1000).toFixed(2).padStart(7)} s`;

function line(name: string, ms: number | null, baseMs: number, wanted: string): void {
  const figures =
    ms === null ? "  not installed" : `${seconds(ms)}  ${(ms / baseMs).toFixed(2).padStart(7)} x ours`;
  console.log(`  ${name.padEnd(34)}${figures}   ${wanted}`);
}

/**
 * Prints how fast and how lean reading is, as ratios within one run on one machine: against togeojson over
 * xmldom, saxes alone, and (where Debian's packages are) gpxpy, gpsbabel and xmllint; then growth and memory.
 */
export async function benchReading(): Promise<void> {
  const folder = fs.mkdtempSync(path.join(os.tmpdir(), "reading-"));
  const fileOf = (fixes: number): string => {
    const file = path.join(folder, `${fixes}.gpx`);
    if (!fs.existsSync(file)) writeTrack(file, fixes);
    return file;
  };
  try {
    const [small, day, million] = [fileOf(14_400), fileOf(144_000), fileOf(1_000_000)];
    const megabytes = (file: string): string => `${(fs.statSync(file).size / 1e6).toFixed(0)} MB`;

    console.log(`Reading 14,400 fixes (${megabytes(small)}), best of several rounds`);
    const oursSmall = Math.min(...[1, 2].map(() => inChild("ours", small, 8).ms));
    line("ours", oursSmall, oursSmall, "");
    line("togeojson over xmldom", inChild("wholeDom", small, 2).ms, oursSmall, "(wanted: 40 or more)");

    console.log(`Reading 144,000 fixes (${megabytes(day)})`);
    const dayRounds = [1, 2].map(() => inChild("ours", day, 4));
    const oursDay = Math.min(...dayRounds.map((round) => round.ms));
    line("ours", oursDay, oursDay, "(wanted: under 2 s)");
    line("saxes alone", inChild("saxes", day, 4).ms, oursDay, "(wanted: 0.75 or more)");
    const gpxpy = "import sys, gpxpy\nwith open(sys.argv[1]) as f: gpxpy.parse(f)";
    line("gpxpy", outside("/usr/bin/python3", ["-c", gpxpy, day]), oursDay, "(wanted: 10 or more)");
    line(
      "gpsbabel",
      outside("gpsbabel", ["-t", "-i", "gpx", "-f", day, "-o", "unicsv", "-F", "/dev/null"]),
      oursDay,
      "",
    );
    line("xmllint --stream", outside("xmllint", ["--stream", "--noout", day]), oursDay, "");

    console.log(`Growth and memory, 1,000,000 fixes (${megabytes(million)})`);
    const once = inChild("ours", million, 1);
    const twice = inChild("ours", million, 2);
    line("ours", Math.min(once.ms, twice.ms), oursDay, "");
    // By processor time: on a shared machine the wall clock of a long run says more about the neighbours.
    const cpuDay = Math.min(...dayRounds.map((round) => round.cpuMs));
    const growth = Math.min(once.cpuMs, twice.cpuMs) / 1_000_000 / (cpuDay / 144_000);
    console.log(
      `  processor time per fix against 144,000: ${growth.toFixed(2)}   (wanted: at most 1.15; less is warming up)`,
    );
    console.log(`  memory above the start:           ${once.rssMb.toFixed(0)} MB   (wanted: under 200 MB)`);
  } finally {
    fs.rmSync(folder, { recursive: true, force: true });
  }
}
