import { writeFile } from "node:fs/promises";
import path from "node:path";
import { gzipSync } from "node:zlib";
import { zipSync } from "fflate";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { at } from "@/lib/errors/invariant";
import type { AnalysisProgress, AnalysisTask } from "@/lib/worker/analysis-task";
import { createAnalysisPool, POOL_BUSY, type AnalysisPool } from "@/lib/worker/analysis-pool";
import { bundledWorker } from "@/tests/support/analysis-worker";
import { madeGpx } from "@/tests/support/made-gpx";
import { openTestDatabase } from "@/tests/support/test-database";

let folder: string;
let pool: AnalysisPool;
let close: () => Promise<void>;

beforeAll(async () => {
  const base = await openTestDatabase();
  ({ folder } = base);
  pool = createAnalysisPool({ filename: await bundledWorker(folder), threads: 1 });
  close = async () => {
    await pool.close();
    await base.close();
  };
});
afterAll(() => close());

const taskOf = (file: string): AnalysisTask => ({
  path: file,
  fileName: path.basename(file),
  discipline: null,
  trim: null,
  minimumFlyingSpeedMps: null,
  entryName: null,
});

async function fileOf(name: string, bytes: Uint8Array | string): Promise<string> {
  const file = path.join(folder, name);
  await writeFile(file, bytes);
  return file;
}

const fix = (time: string, lat = "57.1", lon = "9.3") =>
  `<trkpt lat="${lat}" lon="${lon}"><time>${time}</time></trkpt>`;
const gpx = (inside: string) =>
  `<?xml version="1.0"?><gpx version="1.1"><trk><trkseg>${inside}</trkseg></trk></gpx>`;

const spaces = Buffer.alloc(20_000_000, " ");

/** Gzip members one after the other unpack to one long text: 500 MB out of half a megabyte. */
const gzipBomb = () =>
  Buffer.concat([gzipSync("<gpx><trk>"), ...Array.from({ length: 25 }, () => gzipSync(spaces))]);

const HOSTILE: [string, () => Uint8Array | string][] = [
  ["a gzip bomb", gzipBomb],
  ["a zip bomb", () => zipSync({ "bomb.gpx": new Uint8Array(100_000_000).fill(32) }, { level: 9 })],
  [
    "a zip in a zip",
    () => zipSync({ "inner.zip": zipSync({ "a.gpx": new TextEncoder().encode("<gpx/>") }) }),
  ],
  ["tags nested 100,000 deep", () => gpx("<a>".repeat(100_000))],
  ["namespaces nested 20,000 deep", () => gpx('<a xmlns="u">'.repeat(20_000))],
  ["entities that multiply", () => '<!DOCTYPE g [<!ENTITY a "ha"><!ENTITY b "&a;&a;&a;&a;">]><gpx>&b;</gpx>'],
  ["an attribute of 10 MB", () => `<gpx creator="${"x".repeat(10_000_000)}"/>`],
  ["100,000 opening brackets", () => "<".repeat(100_000)],
  ["a photo called GPX", () => Buffer.from([0xff, 0xd8, 0xff, 0xe0, 0, 16, 74, 70, 73, 70])],
  ["one byte", () => "x"],
  ["only a byte order mark", () => Buffer.from([0xef, 0xbb, 0xbf])],
  ["fixes that are no places", () => gpx(fix("2025-06-14T11:00:00Z", "NaN", "1e400").repeat(100))],
  ["a single fix", () => gpx(fix("2025-06-14T11:00:00Z"))],
];

describe("a hostile file through the worker pool", () => {
  test.each(HOSTILE)("%s is refused with a sentence within 3 s", async (name, bytes) => {
    const file = await fileOf(`${name.replaceAll(/[^a-z0-9]/g, "-")}.gpx`, bytes());
    const startedMs = performance.now();
    const outcomes = await pool.run(taskOf(file));
    expect(performance.now() - startedMs).toBeLessThan(3000);
    for (const outcome of outcomes) {
      expect(outcome.kind).toBe("refused");
      expect(outcome.kind === "refused" ? outcome.text : "").toMatch(/^[A-Z].*\.$/s);
    }
    expect(outcomes.length).toBeGreaterThan(0);
  });

  test.each([
    ["one instant for all fixes", gpx(fix("2025-06-14T11:00:00Z").repeat(500))],
    ["two fixes a century apart", gpx(fix("1990-01-01T00:00:00Z") + fix("2089-12-31T00:00:00Z", "57.2"))],
    [
      "a year of one fix a day",
      gpx(
        Array.from({ length: 365 }, (_, day) => fix(new Date(Date.UTC(2025, 0, 1 + day)).toISOString())).join(
          "",
        ),
      ),
    ],
    [
      "times that run backwards",
      gpx(
        Array.from({ length: 500 }, (_, i) =>
          fix(new Date(Date.UTC(2025, 5, 14, 11, 0, 500 - i)).toISOString(), (57 + i * 1e-5).toFixed(6)),
        ).join(""),
      ),
    ],
    [
      "a way over the antimeridian and a pole",
      gpx(
        fix("2025-06-14T11:00:00Z", "89.9999", "179.9999") +
          fix("2025-06-14T11:00:01Z", "89.9999", "-179.9999") +
          fix("2025-06-14T11:00:02Z", "90", "0"),
      ),
    ],
  ])("%s gives an answer, not an error, within 3 s", async (name, text) => {
    const file = await fileOf(`${name.replaceAll(" ", "-")}.gpx`, text);
    const startedMs = performance.now();
    const outcome = at(await pool.run(taskOf(file)), 0);
    expect(performance.now() - startedMs).toBeLessThan(3000);
    if (outcome.kind === "read") expect(outcome.series.length).toBeLessThan(5_000_000);
    else expect(outcome.text).toMatch(/^[A-Z].*\.$/s);
  });

  test("a track cut at every tenth is read as far as it goes or refused in words", async () => {
    const whole = madeGpx({ rideS: 300 });
    for (let tenth = 1; tenth < 10; tenth += 1) {
      const file = await fileOf("cut.gpx", whole.slice(0, Math.floor((whole.length * tenth) / 10)));
      const outcome = at(await pool.run(taskOf(file)), 0);
      if (outcome.kind === "refused") expect(outcome.text).toMatch(/^[A-Z].*\.$/s);
      else expect(outcome.quality.notes.map(({ code }) => code)).toContain("cut_short");
    }
  });
});

describe("the worker pool", () => {
  const worker = (name: string, code: string) => fileOf(`${name}.mjs`, code);

  test("ends a worker that needs too much memory, says so, and goes on with a fresh one", async () => {
    const filename = await worker(
      "hungry",
      `export default function ({ task, progress }) {
        progress.postMessage({ step: "reading" });
        if (task.fileName === "small") { progress.close(); return []; }
        const all = [];
        for (let i = 0; ; i += 1) all.push({ i, text: "x" + i });
      }`,
    );
    const small = createAnalysisPool({ filename, threads: 1, heapMbMax: 40 });
    expect(await small.run(taskOf("big"))).toMatchObject([
      { kind: "refused", code: "out_of_memory", text: expect.stringContaining("memory") as string },
    ]);
    expect(await small.run(taskOf("small"))).toEqual([]);
    await small.close();
  });

  test("ends a worker that takes too long, says so, and goes on with a fresh one", async () => {
    const filename = await worker(
      "slow",
      `export default function ({ task, progress }) {
        progress.postMessage({ step: "reading" });
        while (task.fileName !== "quick") {}
        progress.close();
        return [];
      }`,
    );
    const small = createAnalysisPool({ filename, threads: 1, timeLimitMs: 300 });
    const startedMs = performance.now();
    expect(await small.run(taskOf("endless"))).toMatchObject([{ kind: "refused", code: "took_too_long" }]);
    expect(performance.now() - startedMs).toBeLessThan(3000);
    expect(await small.run(taskOf("quick"))).toEqual([]);
    await small.close();
  });

  test("refuses politely when too many files wait, and passes on what is nobody's file's fault", async () => {
    const filename = await worker(
      "broken",
      `export default async function ({ task, progress }) {
        progress.close();
        if (task.fileName === "bug") throw new Error("a bug of ours");
        await new Promise((resolve) => setTimeout(resolve, 300));
        return [];
      }`,
    );
    const small = createAnalysisPool({ filename, threads: 1, queueMax: 1 });
    await small.run(taskOf("warm"));
    const results = await Promise.allSettled(["a", "b", "c", "d"].map((name) => small.run(taskOf(name))));
    const refused = results.filter(({ status }) => status === "rejected");
    expect(refused.length).toBeGreaterThan(0);
    for (const one of refused) expect(one).toMatchObject({ reason: { code: POOL_BUSY } });
    await expect(small.run(taskOf("bug"))).rejects.toThrow("a bug of ours");
    await small.close();
  });

  test("says how far it is: reading, then analysing", async () => {
    const steps: AnalysisProgress[] = [];
    await pool.run(taskOf(await fileOf("ride.gpx", madeGpx({ rideS: 60 }))), (step) => steps.push(step));
    expect(steps).toEqual([{ step: "reading" }, { step: "analysing", done: 0, total: 1 }]);
  });
});
