import fc from "fast-check";
import { gzipSync } from "fflate";
import { describe, expect, it } from "vitest";
import { readFile, type ReadOutcome } from "@/lib/formats/read-file";
import { writeGpx } from "@/lib/formats/write-gpx";
import { FixColumns } from "@/lib/track/fix-columns";
import type { Fixes } from "@/lib/track/fixes";
import { bytesOf, fixtureBytes, gpxDocument, points } from "@/tests/support/reading";

/** Set READER_RUNS for a long hunt; a few hundred runs are made every time. */
const RUNS = Number(process.env["READER_RUNS"] ?? 300);
const SEED = 20250614;

/** What holds for every track, whatever it was read from. */
function expectValid(fixes: Fixes): void {
  const { count, segmentStarts } = fixes;
  const columns = [fixes.timeMs, fixes.latDeg, fixes.lonDeg];
  const optional = [
    fixes.elevationM,
    fixes.heartRateBpm,
    fixes.receiverSpeedMps,
    fixes.hdop,
    fixes.satellites,
  ];
  for (const column of columns) {
    expect(column.length).toBe(count);
    expect(column.every(Number.isFinite)).toBe(true);
  }
  for (const column of optional) if (column !== null) expect(column.length).toBe(count);
  expect(fixes.latDeg.every((lat) => Math.abs(lat) <= 90)).toBe(true);
  expect(fixes.lonDeg.every((lon) => Math.abs(lon) <= 180)).toBe(true);
  expect(segmentStarts[0]).toBe(count === 0 ? undefined : 0);
  segmentStarts.forEach((start, index) => {
    expect(start).toBeLessThan(count);
    if (index > 0) expect(start).toBeGreaterThan(segmentStarts[index - 1] ?? count);
  });
}

async function expectAnswer(bytes: Uint8Array): Promise<ReadOutcome[]> {
  const outcomes = await readFile(bytes, { fileName: "mutant" });
  expect(outcomes.length).toBeGreaterThan(0);
  for (const outcome of outcomes) {
    if (outcome.kind === "read") {
      expectValid(outcome.fixes);
      expect(outcome.fixes.count).toBeGreaterThanOrEqual(2);
      for (const note of outcome.notes) expect(note.text).toMatch(/^[A-Z0-9].*\.$/);
    } else {
      expect(outcome.error.code).toMatch(/^[a-z_]+$/);
      expect(outcome.error.message).toMatch(/^[A-Z].*\.$/);
    }
  }
  return outcomes;
}

type Mutation = {
  at: number;
  kind: "replace" | "insert" | "delete" | "repeat";
  with: Uint8Array;
  length: number;
};

const snippet = fc.constantFrom(
  ...'<,>,/,",\',&,&#0;,<![CDATA[,]]>,<!--,-->,<?,<trkpt>,</trkpt>,</trkseg>,<trkseg/>,lat="999",NaN,1e999,\0,\ufeff,<!DOCTYPE x>'.split(
    ",",
  ),
);
const mutation: fc.Arbitrary<Mutation> = fc.record({
  at: fc.double({ min: 0, max: 1, noNaN: true }),
  kind: fc.constantFrom("replace", "insert", "delete", "repeat"),
  with: fc.oneof(fc.uint8Array({ minLength: 1, maxLength: 6 }), snippet.map(bytesOf)),
  length: fc.integer({ min: 1, max: 200 }),
});

function mutate(bytes: Uint8Array, { at, kind, with: put, length }: Mutation): Uint8Array {
  const place = Math.floor(at * bytes.length);
  const head = bytes.subarray(0, place);
  const tail = bytes.subarray(place);
  if (kind === "insert") return Uint8Array.from([...head, ...put, ...tail]);
  if (kind === "replace") return Uint8Array.from([...head, ...put, ...tail.subarray(put.length)]);
  if (kind === "delete") return Uint8Array.from([...head, ...tail.subarray(length)]);
  return Uint8Array.from([...head, ...tail.subarray(0, length), ...tail]);
}

const originals: Readonly<Record<string, Uint8Array>> = {
  gpx: bytesOf(gpxDocument(points(9), points(4, 9))),
  "gpx 1.0": fixtureBytes("gpx/Geotag.gpx"),
  tcx: fixtureBytes("tcx/two-laps.tcx"),
  "kml track": fixtureBytes("kml/gx-track.kml"),
  "kml places": fixtureBytes("kml/timed-placemarks.kml"),
  fit: fixtureBytes("fit/activity.fit"),
  gzip: fixtureBytes("archive/morning.gpx.gz"),
  zip: fixtureBytes("archive/two-sessions.zip"),
};

describe("whatever is done to a file, it is a valid track or a refusal with a code and a sentence", () => {
  it.each(Object.entries(originals))("%s", async (_, bytes) => {
    await fc.assert(
      fc.asyncProperty(fc.array(mutation, { minLength: 1, maxLength: 5 }), async (mutations) => {
        await expectAnswer(mutations.reduce(mutate, bytes));
      }),
      { seed: SEED, numRuns: RUNS },
    );
  });

  it("bytes of any kind", async () => {
    const start = fc.constantFrom(
      [],
      [0x1f, 0x8b, 8],
      [0x50, 0x4b, 3, 4],
      [14, 16, 0, 0, 9, 0, 0, 0, 46, 70, 73, 84],
      [60],
    );
    await fc.assert(
      fc.asyncProperty(start, fc.uint8Array({ maxLength: 300 }), async (head, rest) => {
        await expectAnswer(Uint8Array.from([...head, ...rest]));
      }),
      { seed: SEED, numRuns: RUNS },
    );
  });
});

describe("reading undoes writing", () => {
  const fix = fc.record({
    timeMs: fc.integer({ min: Date.UTC(1980, 0, 7), max: Date.UTC(2099, 11, 31) }),
    lat: fc.integer({ min: -90_000_000, max: 90_000_000 }),
    // Far from 0, 0, which is a receiver without a position, and from 180, which GPX 1.1 writes as -180.
    lon: fc.integer({ min: 10_000_000, max: 179_999_999 }),
    elevation: fc.option(fc.integer({ min: -400, max: 9000 }), { nil: null }),
    heart: fc.option(fc.integer({ min: 40, max: 220 }), { nil: null }),
    starts: fc.boolean(),
  });

  it("for any track, plain and packed", async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(fix, { minLength: 2, maxLength: 600 }), async (rows) => {
        const columns = new FixColumns();
        for (const { timeMs, lat, lon, elevation, heart, starts } of rows) {
          if (starts) columns.startSegment();
          const row = columns.append(timeMs, lat / 1e6, lon / 1e6);
          if (elevation !== null) columns.set("elevationM", row, elevation);
          if (heart !== null) columns.set("heartRateBpm", row, heart);
        }
        const fixes = columns.finish();
        expectValid(fixes);
        const bytes = bytesOf([...writeGpx(fixes, { title: "any" })].join(""));
        for (const file of [bytes, gzipSync(bytes)]) {
          const [outcome] = await expectAnswer(file);
          if (outcome?.kind !== "read") throw new Error(JSON.stringify(outcome));
          expect(outcome.fixes).toEqual(fixes);
        }
      }),
      { seed: SEED, numRuns: Math.ceil(RUNS / 6) },
    );
  });
});
