import { gzipSync, strToU8, zipSync } from "fflate";
import { describe, expect, it } from "vitest";
import type { ReadLimits } from "./read-limits";
import { readFile } from "./read-file";
import {
  bytesOf,
  fixtureBytes,
  gpxDocument,
  noteCount,
  points,
  readOk,
  readRefused,
} from "@/tests/support/reading";

/** A source that gives its bytes a few at a time. */
async function* dripping(bytes: Uint8Array, size: number): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
}

function utf16(text: string, mark: boolean, littleEndian: boolean): Uint8Array {
  const units = [...(mark ? [0xfeff] : []), ...Array.from(text, (_, index) => text.charCodeAt(index))];
  const bytes = new Uint8Array(units.length * 2);
  const view = new DataView(bytes.buffer);
  units.forEach((unit, index) => view.setUint16(index * 2, unit, littleEndian));
  return bytes;
}

function latin1(text: string): Uint8Array {
  return Uint8Array.from(text, (character) => character.charCodeAt(0));
}

const document = gpxDocument(points(5)).replace("<trk>", "<trk><name>Løkken</name>");

describe("TCX, KML and FIT", () => {
  it("reads every Track of a TCX activity as a segment and keeps heart rate and speed with their fix", async () => {
    const read = await readOk(fixtureBytes("tcx/two-laps.tcx"));
    const { fixes } = read;
    expect([read.format, read.title, fixes.count, read.rawSegments]).toEqual([
      "tcx",
      "Evening downwinder",
      21,
      2,
    ]);
    expect([...fixes.segmentStarts]).toEqual([0, 11]);
    expect(noteCount(read, "no_position")).toBe(1);
    // Second 7 lacks its heart rate, second 4 its position: those behind them must not move up.
    const seconds = Array.from(fixes.timeMs, (ms) => (ms / 1000) % 60);
    seconds.forEach((second, index) => {
      const expected = second === 7 ? Number.NaN : 110 + Math.floor(second / 5);
      expect(fixes.heartRateBpm?.[index]).toBe(expected);
      expect(fixes.receiverSpeedMps?.[index]).toBeCloseTo(6 + 0.1 * (second % 4), 9);
      expect(fixes.lonDeg[index]).toBeCloseTo(9.05 + second * 8.9e-5, 7);
    });
  });

  it("ignores a TCX course, and says so", async () => {
    const course = new TextDecoder()
      .decode(fixtureBytes("tcx/two-laps.tcx"))
      .replaceAll("Activity", "Course")
      .replaceAll("Activities", "Courses");
    expect(await readRefused(course)).toMatchObject({ code: "no_times", format: "tcx" });
  });

  it("pairs the times and positions of a gx:Track in order, empty ones too, and finds its heart rates", async () => {
    const read = await readOk(fixtureBytes("kml/gx-track.kml"));
    expect([read.format, read.title, read.fixes.count]).toEqual(["kml", "Jammerbugt run", 13]);
    const seconds = Array.from(read.fixes.timeMs, (ms) => (ms / 1000) % 60);
    expect(seconds).not.toContain(5);
    seconds.forEach((second, index) => {
      expect(read.fixes.lonDeg[index]).toBeCloseTo(9.05 + second * 8.9e-5, 7);
      expect(read.fixes.heartRateBpm?.[index]).toBe(110 + Math.floor(second / 5));
    });
  });

  it("counts times and positions of a gx:Track that have no partner", async () => {
    const text = new TextDecoder().decode(fixtureBytes("kml/gx-track.kml"));
    const read = await readOk(text.replace("<when>2025-06-14T10:00:13Z</when>", ""));
    expect([read.fixes.count, noteCount(read, "counts_differ")]).toEqual([12, 1]);
  });

  it("reads timed placemarks as segments and ignores places and lines without times, with a word", async () => {
    const read = await readOk(fixtureBytes("kml/timed-placemarks.kml"));
    expect([read.title, read.fixes.count, [...read.fixes.segmentStarts]]).toEqual(["Phone log", 8, [0, 6]]);
    const counts = ["waypoints_ignored", "lines_ignored", "no_time"].map((code) => noteCount(read, code));
    expect(counts).toEqual([1, 1, 1]);
    expect((read.fixes.timeMs[7] ?? 0) - (read.fixes.timeMs[6] ?? 0)).toBe(6000);
  });

  it("refuses KML that only draws a line or marks places", async () => {
    const kml = (body: string): string =>
      `<kml xmlns="http://www.opengis.net/kml/2.2"><Placemark>${body}</Placemark></kml>`;
    const line = await readRefused(kml("<LineString><coordinates>9,57 9.1,57</coordinates></LineString>"));
    expect([line.code, line.message]).toEqual([
      "no_times",
      expect.stringContaining("drawn line without times"),
    ]);
    const place = await readRefused(kml("<Point><coordinates>9,57</coordinates></Point>"));
    expect(place.message).toContain("places only");
  });

  it("reads FIT through the maker's decoder: semicircles, heights, speeds, heart rates; skips missing positions", async () => {
    const read = await readOk(fixtureBytes("fit/activity.fit"));
    expect([read.format, read.fixes.count, noteCount(read, "no_position")]).toEqual(["fit", 24, 1]);
    const { fixes } = read;
    Array.from(fixes.timeMs, (ms) => (ms / 1000) % 60).forEach((second, index) => {
      // A semicircle is 8.4e-8 degrees; heights have steps of 0.2 m, speeds of 0.001 m/s.
      expect(fixes.lonDeg[index]).toBeCloseTo(9.05 + second * 8.9e-5, 6);
      expect(fixes.heartRateBpm?.[index]).toBe(110 + Math.floor(second / 5));
      expect(fixes.receiverSpeedMps?.[index]).toBeCloseTo(6 + 0.1 * (second % 4), 3);
      expect(fixes.elevationM?.[index]).toBeCloseTo((second % 7) * 0.2 - 0.4, 6);
    });
  });

  it("keeps nothing of a FIT file's owner and device", async () => {
    const text = JSON.stringify(await readFile(fixtureBytes("fit/activity.fit"), { fileName: "a.fit" }));
    expect(text).not.toMatch(/Secret|Owner|123454321/);
  });

  it("keeps the whole records of a FIT file that was cut short, and notes a wrong checksum", async () => {
    const bytes = fixtureBytes("fit/activity.fit");
    const cut = await readOk(bytes.subarray(0, bytes.length - 120));
    expect(cut.fixes.count).toBeGreaterThan(10);
    expect(noteCount(cut, "cut_short")).toBe(1);
    const changed = bytes.slice();
    changed[changed.length - 1] = (changed[changed.length - 1] ?? 0) ^ 0xff;
    expect(noteCount(await readOk(changed), "checksum")).toBe(1);
    expect((await readRefused(bytes.subarray(0, 30))).code).toBe("broken_fit");
  });

  it("reads FIT records with compressed time stamps, which the decoder itself refuses", async () => {
    // Definition of record with lat, lon only (local 1), after a full time stamp in a local 0 record.
    const u32 = (value: number): number[] => [
      value & 255,
      (value >>> 8) & 255,
      (value >>> 16) & 255,
      (value >>> 24) & 255,
    ];
    const time = Math.floor(Date.UTC(2025, 5, 14, 10) / 1000) - 631_065_600;
    const semi = (degrees: number): number[] => u32(Math.round((degrees * 2 ** 31) / 180));
    const body = [
      ...[0x40, 0, 0, 20, 0, 3, 253, 4, 0x86, 0, 4, 0x85, 1, 4, 0x85],
      ...[0x41, 0, 0, 20, 0, 2, 0, 4, 0x85, 1, 4, 0x85],
      ...[0, ...u32(time), ...semi(57), ...semi(9)],
      ...[1, 3, 40].flatMap((later) => [0x80 | (1 << 5) | ((time + later) & 31), ...semi(57), ...semi(9)]),
    ];
    const file = Uint8Array.from([12, 16, 0, 0, ...u32(body.length), 0x2e, 0x46, 0x49, 0x54, ...body, 0, 0]);
    const read = await readOk(file);
    // The five bits roll over every 32 s: 40 s after the start is read as 8 s, the next such instant.
    expect(Array.from(read.fixes.timeMs, (ms) => (ms / 1000) % 60)).toEqual([0, 1, 3, 8]);
  });
});

describe("archives", () => {
  it("gives one outcome for each file of a zip, folders and hidden files aside", async () => {
    const outcomes = await readFile(fixtureBytes("archive/two-sessions.zip"), { fileName: "day.zip" });
    expect(outcomes.map((outcome) => [outcome.name, outcome.kind])).toEqual([
      ["morning.gpx", "read"],
      ["trip/evening.gpx.gz", "read"],
      ["trip/read me.txt", "refused"],
    ]);
  });

  it("reads gzip whatever its name, and keeps what is whole of one that was cut short", async () => {
    const packed = fixtureBytes("archive/morning.gpx.gz");
    expect((await readOk(packed, { fileName: "photo.jpg" })).fixes.count).toBe(20);
    const cut = await readOk(packed.subarray(0, packed.length - 60));
    expect(cut.fixes.count).toBeGreaterThanOrEqual(2);
    expect(noteCount(cut, "cut_short")).toBe(1);
    expect((await readRefused(packed.subarray(0, 40))).code).toMatch(/not_well_formed|empty|unknown_format/);
    const damaged = packed.slice();
    damaged.fill(0xa5, 60, 90);
    expect((await readRefused(damaged)).code).toMatch(/broken_archive|not_well_formed/);
  });

  it("refuses archives in archives, entry by entry", async () => {
    const inner = zipSync({ "a.gpx": strToU8(document) });
    const outcomes = await readFile(zipSync({ "inner.zip": inner, "a.gpx": strToU8(document) }), {
      fileName: "x.zip",
    });
    expect(outcomes.map((outcome) => (outcome.kind === "read" ? "read" : outcome.error.code))).toEqual([
      "nested_archive",
      "read",
    ]);
    expect((await readRefused(gzipSync(gzipSync(strToU8(document))))).code).toBe("nested_archive");
    expect((await readRefused(gzipSync(inner))).code).toBe("nested_archive");
  });

  it("makes path-traversal names harmless", async () => {
    const zip = zipSync({ "../../etc/passwd.gpx": strToU8(document), "C:\\x\\y.gpx": strToU8(document) });
    const outcomes = await readFile(zip, { fileName: "../../x.zip" });
    expect(outcomes.map((outcome) => [outcome.kind, outcome.name])).toEqual([
      ["read", "etc/passwd.gpx"],
      ["read", "x/y.gpx"],
    ]);
  });

  it("refuses a locked file by its own words", async () => {
    const zip = zipSync({ "a.gpx": strToU8(document) });
    const view = new DataView(zip.buffer, zip.byteOffset, zip.length);
    // Bit 0 of the general purpose flag in the local and in the central header (APPNOTE 4.4.4).
    const central = zip.findIndex((_, at) => at + 4 < zip.length && view.getUint32(at, true) === 0x02014b50);
    view.setUint16(6, view.getUint16(6, true) | 1, true);
    view.setUint16(central + 8, view.getUint16(central + 8, true) | 1, true);
    const error = await readRefused(zip);
    expect([error.code, error.message]).toEqual(["broken_archive", expect.stringContaining("password")]);
  });

  it("refuses an empty and a damaged zip, and one with too many files", async () => {
    expect((await readRefused(zipSync({}))).code).toBe("no_track");
    const zip = zipSync({ "a.gpx": strToU8(document) });
    expect((await readRefused(zip.subarray(0, zip.length - 30))).code).toBe("broken_archive");
    const many = Object.fromEntries(
      Array.from({ length: 51 }, (_, index) => [`${index}.gpx`, strToU8(document)]),
    );
    expect((await readRefused(zipSync(many))).code).toBe("too_many_files");
  });
});

describe("encodings", () => {
  const declared = (encoding: string): string => document.replace("UTF-8", encoding);

  it.each([
    ["UTF-8 with a mark", new Uint8Array([0xef, 0xbb, 0xbf, ...bytesOf(document)])],
    ["UTF-16 LE with a mark", utf16(declared("UTF-16"), true, true)],
    ["UTF-16 BE with a mark", utf16(declared("UTF-16"), true, false)],
    ["UTF-16 LE without a mark", utf16(declared("UTF-16"), false, true)],
    ["UTF-16 BE without a mark", utf16(declared("UTF-16"), false, false)],
    ["UTF-16 declared, UTF-8 written", bytesOf(declared("UTF-16"))],
    ["Latin-1, declared", latin1(declared("ISO-8859-1"))],
    ["Latin-1 declared, UTF-8 written", bytesOf(declared("ISO-8859-1"))],
    ["an encoding nobody knows", bytesOf(declared("x-none"))],
    ["UTF-8 without a declaration", bytesOf(document.replace(/<\?xml.*?\?>/, "\n  "))],
  ])("reads %s", async (_, bytes) => {
    const read = await readOk(bytes);
    expect([read.title, read.fixes.count, read.notes.length]).toEqual(["Løkken", 5, 0]);
  });

  it("reads Latin-1 that claims to be UTF-8, with a note", async () => {
    const read = await readOk(latin1(document));
    expect([read.title, read.fixes.count, noteCount(read, "encoding_repaired")]).toEqual(["Løkken", 5, 1]);
  });

  it("reads the same whatever pieces the bytes come in", async () => {
    const long = bytesOf(gpxDocument(points(900)).replace("<trk>", "<trk><name>Løkken ☀</name>"));
    for (const size of [1, 7, 4096]) {
      const [outcome] = await readFile(dripping(long, size), { fileName: "x.gpx" });
      expect(outcome).toMatchObject({ kind: "read", title: "Løkken ☀", fixes: { count: 900 } });
    }
    // Wider than one piece, so that characters and tags are cut by the reader itself.
    const wide = bytesOf(
      gpxDocument(points(3000)).replaceAll("</trkpt>", `<cmt>${"ø☀".repeat(60)}</cmt></trkpt>`),
    );
    expect((await readOk(wide)).fixes.count).toBe(3000);
  });
});

describe("files that are no track", () => {
  const found = async (source: Uint8Array | string): Promise<string> => {
    const error = await readRefused(source);
    expect(error.code).toBe("unknown_format");
    return error.message;
  };

  it("says what it is instead", async () => {
    expect(await found("<html><body>no</body></html>")).toContain("web page");
    expect(await found("<!DOCTYPE html>\n<html></html>")).toContain("web page");
    expect(await found("<svg xmlns='http://www.w3.org/2000/svg'/>")).toContain("XML, but of another kind");
    expect(await found(new Uint8Array([0xff, 0xd8, 0xff, 0xe0, 0, 16, 74, 70, 73, 70]))).toContain("photo");
    expect(await found('{"type":"FeatureCollection"}')).toContain("JSON");
    expect(await found("Dear Sir, the wind was fine today and the swell was long.")).toContain("plain text");
    expect(await found("$GPRMC,123519,A,4807.038,N,01131.000,E")).toContain("NMEA");
    expect(await found(new Uint8Array(300).fill(7))).toContain("unknown kind");
    expect(await found("x")).toContain("a few characters");
  });

  it("calls an empty, a blank and a mark-only file empty", async () => {
    for (const bytes of [[], [0xef, 0xbb, 0xbf], [0xff, 0xfe], [32, 10, 10]]) {
      expect((await readRefused(new Uint8Array(bytes))).code).toBe("empty");
    }
    expect((await readRefused(gzipSync(new Uint8Array(0)))).code).toBe("empty");
  });

  it("refuses a track without fixes, without times, with too few, each in its own words", async () => {
    expect((await readRefused(gpxDocument())).code).toBe("no_track");
    expect((await readRefused(gpxDocument(points(1)))).code).toBe("too_few_fixes");
    const untimed = await readRefused(gpxDocument('<trkpt lat="57" lon="9"/>'.repeat(3)));
    expect([untimed.code, untimed.message]).toEqual([
      "no_times",
      expect.stringContaining("track without times"),
    ]);
    const unset = await readRefused(
      gpxDocument('<trkpt lat="57" lon="9"><time>1970-01-01T00:00:09Z</time></trkpt>'),
    );
    expect([unset.code, unset.message]).toEqual(["no_times", expect.stringContaining("never set")]);
    const route = await readRefused('<gpx><rte><rtept lat="57" lon="9"/></rte></gpx>');
    expect([route.code, route.message]).toEqual(["no_times", expect.stringContaining("route without times")]);
  });
});

describe("limits", () => {
  const past = (limits: Partial<ReadLimits>, source: Uint8Array | string = document) =>
    readRefused(source, { limits });

  it("names the limit that was met", async () => {
    expect(await past({ fixes: 4 })).toMatchObject({
      code: "too_many_fixes",
      message: expect.stringContaining("4 fixes"),
    });
    expect(await past({ unpackedBytes: 100 })).toMatchObject({ code: "too_large_unpacked" });
    expect(await past({ sentBytes: 100 }, fixtureBytes("archive/two-sessions.zip"))).toMatchObject({
      code: "too_large_unpacked",
    });
    expect(await past({ depth: 3 })).toMatchObject({
      code: "too_deep",
      place: expect.stringMatching(/^character /),
    });
    expect(await past({ attributes: 1 })).toMatchObject({ code: "too_many_attributes" });
    expect(await past({ attributeLength: 10 })).toMatchObject({ code: "attribute_too_long" });
    expect(await past({ textLength: 10 })).toMatchObject({ code: "text_too_long" });
  });

  it("stops at the deadline of the clock it is given", async () => {
    let now = 0;
    const error = await readRefused(document, { nowMs: () => (now += 15_000), limits: { timeMs: 10_000 } });
    expect(error.code).toBe("took_too_long");
  });

  it("shares bytes and fixes among the files of a zip and opens none after they are spent", async () => {
    const zip = zipSync({
      "a.gpx": strToU8(document),
      "b.gpx": strToU8(document),
      "c.gpx": strToU8(document),
    });
    const outcomes = await readFile(zip, { fileName: "x.zip", limits: { fixes: 8 } });
    expect(outcomes.map((outcome) => (outcome.kind === "read" ? "read" : outcome.error.code))).toEqual([
      "read",
      "too_many_fixes",
      "too_many_fixes",
    ]);
  });

  it("lets an error of the source itself pass, and closes the source", async () => {
    let closed = false;
    async function* failing(): AsyncGenerator<Uint8Array> {
      try {
        yield bytesOf(document).subarray(0, 200);
        throw new Error("the disk is gone");
      } finally {
        closed = true;
      }
    }
    await expect(readFile(failing(), { fileName: "x.gpx" })).rejects.toThrow("the disk is gone");
    expect(closed).toBe(true);
  });
});
