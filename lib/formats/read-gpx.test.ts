import fs from "node:fs";
import { describe, expect, it } from "vitest";
import { parseDateTime } from "./parse-date-time";
import { readFile } from "./read-file";
import {
  csvRows,
  fixtureBytes,
  fixturePath,
  gpxDocument,
  noteCount,
  point,
  points,
  readOk,
  readRefused,
} from "@/tests/support/reading";

type Case = {
  id: string;
  what: string;
  xml: string;
  tolerant_reading: {
    segments?: number[];
    points?: number;
    bad_points?: number;
    speed_mps?: number[];
    ele?: number[];
    speed_readable?: boolean;
    name?: string;
    error?: boolean;
  };
};

const structure = JSON.parse(fs.readFileSync(fixturePath("checks/gpx_structure.json"), "utf8")) as {
  cases: Case[];
};

/** The cases hold points without times; a time is put into each so that it counts as a fix. */
function timed(xml: string): string {
  let second = 0;
  const time = (prefix: string): string =>
    `<${prefix}time>2025-06-14T10:00:${String(second++).padStart(2, "0")}Z</${prefix}time>`;
  return xml
    .replaceAll(
      /<(\w+:)?trkpt([^>]*)\/>/g,
      (_, prefix = "", rest: string) => `<${prefix}trkpt${rest}>${time(prefix)}</${prefix}trkpt>`,
    )
    .replaceAll(/<(\w+:)?trkpt([^>]*)>(?!.{0,30}<time)(?!<(\w+:)?time)/g, (whole, prefix = "") => {
      return whole.includes("/") ? whole : `${whole}${time(prefix)}`;
    });
}

describe("the structure of GPX", () => {
  // Source: GPX 1.0 and 1.1 schemas; the tolerant reading is our own expectation, stated before the reader was.
  it.each(structure.cases)("reads case $id ($what)", async ({ xml, tolerant_reading: expected }) => {
    const [outcome] = await readFile(new TextEncoder().encode(timed(xml)), {
      fileName: "case.gpx",
      limits: { minFixes: 1 },
    });
    if (expected.error === true) {
      expect(outcome).toMatchObject({ kind: "refused", error: { code: "not_well_formed" } });
      return;
    }
    if ((expected.points ?? 0) === 0) {
      expect(outcome?.kind).toBe("refused");
      expect(outcome?.kind === "refused" && outcome.error.code).toMatch(/^(no_track|no_times)$/);
      return;
    }
    if (outcome?.kind !== "read") throw new Error(JSON.stringify(outcome));
    const { fixes } = outcome;
    expect(fixes.count).toBe(expected.points);
    const filled = (expected.segments ?? []).filter((length) => length > 0);
    const starts = [...fixes.segmentStarts, fixes.count];
    expect(filled.map((_, index) => (starts[index + 1] ?? 0) - (starts[index] ?? 0))).toEqual(filled);
    if (expected.speed_mps) expect(Array.from(fixes.receiverSpeedMps ?? [])).toEqual(expected.speed_mps);
    if (expected.speed_readable) expect(fixes.receiverSpeedMps?.[0]).toBeGreaterThan(0);
    if (expected.ele) expect(Array.from(fixes.elevationM ?? [])).toEqual(expected.ele);
  });

  it("takes the track's name, resolved from CDATA and entities, as the title", async () => {
    const document = gpxDocument(points(3)).replace(
      "<trk>",
      "<trk><name><![CDATA[A & B]]> &lt;c&gt; &#233;</name>",
    );
    expect((await readOk(document)).title).toBe("A & B <c> é");
  });

  it("falls back on the file's own name, and never takes a waypoint's", async () => {
    const named = gpxDocument(points(3)).replace(
      "<trk>",
      '<metadata><name>Løkken to Blokhus</name></metadata><wpt lat="57" lon="9"><name>Mole</name></wpt><trk>',
    );
    const read = await readOk(named);
    expect(read.title).toBe("Løkken to Blokhus");
    expect(noteCount(read, "waypoints_ignored")).toBe(1);
  });
});

describe("what is ignored or missing around the track", () => {
  it("notes routes beside a track, and a root without a namespace", async () => {
    const document = gpxDocument(points(3))
      .replace("<trk>", '<rte><name>Plan</name><rtept lat="57" lon="9"/></rte><trk>')
      .replace(' xmlns="http://www.topografix.com/GPX/1/1"', "");
    const read = await readOk(document);
    expect([read.title, noteCount(read, "routes_ignored"), noteCount(read, "namespace_missing")]).toEqual([
      null,
      1,
      1,
    ]);
  });

  it("reads points that stand in no segment and tracks without one", async () => {
    const read = await readOk(`<gpx xmlns="x"><trk>${points(3)}</trk><trk>${points(2, 3)}</trk></gpx>`);
    expect([read.fixes.count, [...read.fixes.segmentStarts], read.rawSegments]).toEqual([5, [0, 3], 2]);
  });

  it("counts a recorded segment even when none of its points is usable", async () => {
    const read = await readOk(gpxDocument(points(3), '<trkpt lat="57" lon="9"/>', ""));
    expect([read.rawSegments, read.fixes.segmentStarts.length]).toEqual([2, 1]);
  });
});

describe("latitude and longitude", () => {
  // Source: GPX schemas, verdicts of two validators. Row L37: 180 in GPX 1.1 is the same meridian as -180 and is kept.
  it.each(csvRows("checks/gpx_lexical.csv"))("keeps or drops $id ($attribute '$lexical')", async (row) => {
    const at = row["attribute"] === "lat" ? [row["lexical"], "9"] : ["57", row["lexical"]];
    const other = row["attribute"] === "lat" ? 'lat="0" lon="9"' : 'lat="57" lon="0"';
    const time = "<time>2025-06-14T10:00:00Z</time>";
    const document = gpxDocument(
      `<trkpt lat="${at[0]}" lon="${at[1]}">${time}</trkpt><trkpt ${other}>${time}</trkpt>`,
    ).replaceAll("1.1", row["gpx_version"] ?? "1.1");
    const { fixes } = await readOk(document, { limits: { minFixes: 1 } });
    const keeps = row["valid_xmlschema"] === "true" || row["id"] === "L37";
    expect(fixes.count).toBe(keeps ? 2 : 1);
    if (keeps) {
      const kept = row["attribute"] === "lat" ? fixes.latDeg[0] : fixes.lonDeg[0];
      expect(kept).toBeCloseTo(Number(row["lexical"]), 12);
    }
  });
});

describe("times", () => {
  it("reads fractions, offsets, midnight as 24 and a missing zone as UTC, with a note", async () => {
    const times = [
      "2025-06-14T10:00:00.25Z",
      "2025-06-14T14:00:01+04:00",
      "2025-06-14T10:00:02",
      "2025-06-14T24:00:00Z",
    ];
    const document = gpxDocument(
      times.map((time) => `<trkpt lat="57" lon="9"><time>${time}</time></trkpt>`).join(""),
    );
    const read = await readOk(document);
    expect([...read.fixes.timeMs]).toEqual([
      parseDateTime("2025-06-14T10:00:00.250Z"),
      parseDateTime("2025-06-14T10:00:01Z"),
      parseDateTime("2025-06-14T10:00:02Z"),
      parseDateTime("2025-06-15T00:00:00Z"),
    ]);
    expect(noteCount(read, "zone_missing")).toBe(1);
  });

  it("drops and counts fixes without a time, with a broken one, a leap second, and an unset clock", async () => {
    const bad = [
      "",
      "<time>yesterday</time>",
      "<time>2016-12-31T23:59:60Z</time>",
      "<time>1970-01-01T00:00:00Z</time>",
    ];
    const document = gpxDocument(
      bad.map((time) => `<trkpt lat="57" lon="9">${time}</trkpt>`).join("") + points(3),
    );
    const read = await readOk(document);
    expect(read.fixes.count).toBe(3);
    expect(noteCount(read, "no_time")).toBe(1);
    expect(noteCount(read, "bad_time")).toBe(2);
    expect(noteCount(read, "clock_not_set")).toBe(1);
    expect(read.notes.map((note) => note.text)).toContain(
      "2 fixes had a time that cannot be read and were left out.",
    );
  });

  it("keeps equal and backward times as they are, for the cleaning to sort", async () => {
    const read = await readOk(gpxDocument(point(5) + point(5) + point(2)));
    expect([...read.fixes.timeMs].map((ms) => (ms / 1000) % 60)).toEqual([5, 5, 2]);
  });
});

describe("what is kept of a fix", () => {
  it("finds heart rate and speed in extensions of any prefix, and GPX 1.0 speed, hdop and sat", async () => {
    const tpx = (prefix: string, inner: string): string =>
      `<extensions><${prefix}TrackPointExtension>${inner}</${prefix}TrackPointExtension></extensions>`;
    const read = await readOk(
      gpxDocument(
        point(0, tpx("ns3:", "<ns3:hr>101</ns3:hr><ns3:speed>5.5</ns3:speed>")) +
          point(1, "<extensions><heartrate>102</heartrate></extensions>") +
          point(2, "<speed>6.25</speed><sat>11</sat><hdop>0.9</hdop><ele>-1.5</ele>") +
          point(3),
      ),
    );
    const { heartRateBpm, receiverSpeedMps, hdop, satellites, elevationM } = read.fixes;
    expect(Array.from(heartRateBpm ?? [])).toEqual([101, 102, Number.NaN, Number.NaN]);
    expect(Array.from(receiverSpeedMps ?? [])).toEqual([5.5, Number.NaN, 6.25, Number.NaN]);
    expect([hdop?.[2], satellites?.[2], elevationM?.[2], elevationM?.[0]]).toEqual([
      0.9,
      11,
      -1.5,
      Number.NaN,
    ]);
    expect(noteCount(read, "prefix_undeclared")).toBe(1);
  });

  it("never takes an elevation or time that stands inside an extension for the fix's own", async () => {
    const read = await readOk(
      gpxDocument(
        points(2) + point(2, "<extensions><ele>77</ele><time>1999-01-01T00:00:00Z</time></extensions>"),
      ),
    );
    expect(read.fixes.elevationM).toBeNull();
    expect(read.fixes.timeMs[2]).toBe(Date.UTC(2025, 5, 14, 10, 0, 2));
  });

  it("leaves impossible heart rates, speeds and elevations out, and keeps the fix", async () => {
    const read = await readOk(
      gpxDocument(points(2) + point(2, "<ele>NaN</ele><speed>-1</speed><extensions><hr>0</hr></extensions>")),
    );
    expect(read.fixes.count).toBe(3);
    expect(noteCount(read, "bad_values")).toBe(3);
  });

  it("keeps one-point segments and reads whatever its size any track to the last fix", async () => {
    for (const count of [2, 255, 256, 257, 513]) {
      const read = await readOk(gpxDocument(points(1), points(count, 1), points(1, count + 1)));
      expect([...read.fixes.segmentStarts]).toEqual([0, 1, count + 1]);
      expect(read.fixes.timeMs[count + 1]).toBe(Date.UTC(2025, 5, 14, 10, 0, count + 1));
    }
  });

  it("drops the 0, 0 of a receiver that does not know its place, and keeps a crossing of the Gulf of Guinea", async () => {
    const stray = await readOk(gpxDocument(point(0, "", 0, 0) + points(3, 1) + point(4, "", 0, 0)));
    expect([stray.fixes.count, noteCount(stray, "zero_position")]).toEqual([3, 2]);
    const real = await readOk(
      gpxDocument(point(0, "", 0.00005, 0) + point(1, "", 0, 0) + point(2, "", -0.00005, 0)),
    );
    expect([real.fixes.count, noteCount(real, "zero_position")]).toEqual([3, 0]);
    expect((await readRefused(gpxDocument(point(0, "", 0, 0) + point(1, "", 0, 0)))).code).toBe("no_track");
  });

  it("drops positions that are missing, no numbers or off the globe, each under its own name", async () => {
    const time = "<time>2025-06-14T10:00:00Z</time>";
    const bad = [
      'lat="57"',
      'lat="x" lon="9"',
      'lat="NaN" lon="9"',
      'lat="91" lon="9"',
      'lat="57" lon="-181"',
    ];
    const read = await readOk(
      gpxDocument(bad.map((at) => `<trkpt ${at}>${time}</trkpt>`).join("") + points(2)),
    );
    expect(read.fixes.count).toBe(2);
    const counts = ["no_position", "bad_position", "out_of_range"].map((code) => noteCount(read, code));
    expect(counts).toEqual([1, 2, 2]);
  });

  it("reads across the antimeridian and at the pole", async () => {
    const read = await readOk(
      gpxDocument(point(0, "", 0, "179.9999") + point(1, "", 0, -179.9999) + point(2, "", 90, 0)),
    );
    expect([...read.fixes.lonDeg]).toEqual([179.9999, -179.9999, 0]);
    expect(read.fixes.latDeg[2]).toBe(90);
  });
});

describe("the sample files", () => {
  const kept = csvRows("checks/gpx_samples.csv").filter((row) => row["kept"] === "copied into gpx/");

  // Source: counts by lxml, gpxpy 1.5.0 and GDAL (they agree); duration and order by the same.
  it.each(kept)("reads $file as three other readers do", async (row) => {
    const bytes = fixtureBytes(`gpx/${row["file"]}`);
    if (row["track_points"] === "0") {
      expect((await readRefused(bytes)).code).toBe("no_times");
      return;
    }
    const { fixes } = await readOk(bytes, { limits: { minFixes: 1 } });
    expect(fixes.count).toBe(Number(row["points_with_time"]));
    expect(fixes.elevationM?.filter(Number.isFinite).length).toBe(Number(row["points_with_ele"]));
    const starts = [...fixes.segmentStarts, fixes.count];
    const lengths = starts.slice(1).map((end, index) => end - (starts[index] ?? 0));
    expect(lengths.join(" ")).toBe(row["points_per_segment"]);
    const steps = Array.from(fixes.timeMs.subarray(1), (time, index) => time - (fixes.timeMs[index] ?? 0));
    expect(steps.filter((step) => step === 0).length).toBe(Number(row["equal_time_steps"]));
    expect(steps.filter((step) => step < 0).length).toBe(Number(row["backward_time_steps"]));
    expect(Math.min(...fixes.timeMs)).toBe(parseDateTime(row["first_time_utc"] ?? ""));
    expect((Math.max(...fixes.timeMs) - Math.min(...fixes.timeMs)) / 1000).toBe(
      Number(row["duration_s_first_to_last"]),
    );
  });
});
