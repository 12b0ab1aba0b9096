import { gzipSync, strToU8, zipSync } from "fflate";
import { createServer } from "node:http";
import { describe, expect, it } from "vitest";
import { readFile, type ReadOutcome } from "./read-file";
import { bytesOf, fixtureBytes, gpxDocument, point, points } from "@/tests/support/reading";

/** Every hostile file must be answered within this. */
const ANSWER_MS = 3000;

const HEAD =
  '<?xml version="1.0"?><gpx version="1.1" creator="x" xmlns="http://www.topografix.com/GPX/1/1"><trk><trkseg>';
const TAIL = "</trkseg></trk></gpx>";
const around = (middle: string): string => `${HEAD}${points(3)}${middle}${points(3, 3)}${TAIL}`;
const doctype = (inside: string, use = ""): string =>
  `<?xml version="1.0"?><!DOCTYPE gpx ${inside}><gpx><trk><name>${use}</name><trkseg>${points(3)}${TAIL}`;
const nested = (depth: number, tag: (level: number) => string): string =>
  Array.from({ length: depth }, (_, level) => tag(level)).join("");

async function answer(source: string | Uint8Array): Promise<ReadOutcome> {
  const started = performance.now();
  const [outcome] = await readFile(typeof source === "string" ? bytesOf(source) : source, {
    fileName: "hostile.gpx",
    nowMs: () => performance.now(),
  });
  expect(performance.now() - started).toBeLessThan(ANSWER_MS);
  if (outcome === undefined) throw new Error("no outcome");
  // A sentence for the rider: no code, no stack, no exception's English.
  const sentences =
    outcome.kind === "read" ? outcome.notes.map((note) => note.text) : [outcome.error.message];
  for (const sentence of sentences) {
    expect(sentence).toMatch(/^[A-Z0-9].*\.$/);
    expect(sentence).not.toMatch(/Error|undefined|NaN\b|null|invariant|_/);
  }
  return outcome;
}

const codeOf = (outcome: ReadOutcome): string => (outcome.kind === "read" ? "read" : outcome.error.code);

describe("hostile files are answered with a sentence, fast", () => {
  it.each<[string, () => string | Uint8Array, string]>([
    ["nothing", () => "", "empty"],
    ["one byte", () => "<", "unknown_format"],
    ["a thousand zero bytes", () => new Uint8Array(1000), "unknown_format"],
    ["zero bytes between the tags", () => around("\0".repeat(1000)), "read"],
    ["a DOCTYPE", () => doctype(""), "doctype"],
    ["a billion laughs", () => doctype('[<!ENTITY a "lol"><!ENTITY b "&a;&a;&a;&a;">]', "&b;"), "doctype"],
    [
      "a quadratic blow-up",
      () => doctype(`[<!ENTITY a "${"x".repeat(50_000)}">]`, "&a;".repeat(50_000)),
      "doctype",
    ],
    ["an outside entity", () => doctype('[<!ENTITY a SYSTEM "file:///etc/passwd">]', "&a;"), "doctype"],
    ["a parameter entity", () => doctype('[<!ENTITY % p SYSTEM "file:///etc/passwd"> %p;]'), "doctype"],
    [
      "unknown entities",
      () => around("<trkpt lat='57&x;' lon='9'><name>&y;&#xFFFFFFFF;&#0;</name></trkpt>"),
      "read",
    ],
    ["100,000 nested tags", () => around(nested(100_000, () => "<a>")), "too_deep"],
    [
      "20,000 nested namespaces",
      () => around(nested(20_000, (n) => `<n${n}:a xmlns:n${n}="u${n}">`)),
      "too_deep",
    ],
    [
      "20,000 namespaces side by side",
      () => around(nested(20_000, (n) => `<n${n}:a xmlns:n${n}="u${n}"/>`)),
      "read",
    ],
    [
      "100,000 attributes",
      () => around(`<a ${nested(100_000, (n) => `a${n}="" `)}/>`),
      "too_many_attributes",
    ],
    ["an attribute of 10 MB", () => around(`<a b="${"x".repeat(10_000_000)}"/>`), "attribute_too_long"],
    ["a tag name of 10 MB", () => around(`<${"x".repeat(10_000_000)}/>`), "attribute_too_long"],
    ["a comment of 10 MB", () => around(`<!--${"x".repeat(10_000_000)}-->`), "read"],
    [
      "CDATA of 10 MB in a time",
      () => around(`<trkpt lat="57" lon="9"><time><![CDATA[${"9".repeat(10_000_000)}]]></time></trkpt>`),
      "read",
    ],
    ["a text of 20 MB", () => around("x".repeat(20_000_000)), "text_too_long"],
    ["a comment without end", () => around(`<!--${"-".repeat(3_000_000)}`), "read"],
    ["100,000 opening signs", () => around("<".repeat(100_000)), "read"],
    ["100,000 opening signs and nothing else", () => "<".repeat(100_000), "not_well_formed"],
    ["a flood of instructions", () => around("<?a b?>".repeat(300_000)), "read"],
    [
      "a flood of instructions before the root",
      () => "<?a b?>".repeat(300_000) + gpxDocument(points(3)),
      "read",
    ],
    ["two roots", () => gpxDocument(points(3)) + gpxDocument(points(3)), "read"],
    ["tags that do not match", () => `${HEAD}${points(3)}</trk></gpx>`, "read"],
    ["an attribute without quotes", () => around("<a b=c/>"), "read"],
    ["GPX inside a web page", () => `<html><body>${gpxDocument(points(3))}</body></html>`, "unknown_format"],
    ["a FIT file named otherwise", () => fixtureBytes("fit/activity.fit"), "read"],
    ["a KML file named otherwise", () => fixtureBytes("kml/gx-track.kml"), "read"],
    [
      "NaN, infinite and far-off positions",
      () =>
        around(["NaN", "Infinity", "1e400", "", "91"].map((lat) => `<trkpt lat="${lat}" lon="9"/>`).join("")),
      "read",
    ],
    ["no times", () => gpxDocument('<trkpt lat="57" lon="9"/>'.repeat(1000)), "no_times"],
    ["one fix", () => gpxDocument(points(1)), "too_few_fixes"],
    ["two fixes", () => gpxDocument(points(2)), "read"],
    [
      "a fix at the pole and across the antimeridian",
      () => gpxDocument(point(0, "", 90, 0) + point(1, "", 0, 180) + point(2, "", 0, -180)),
      "read",
    ],
    [
      "years from 1970 to 9999",
      () =>
        gpxDocument(
          ["1970", "1999", "2099", "9999"]
            .map((year) => `<trkpt lat="57" lon="9"><time>${year}-01-01T00:00:00Z</time></trkpt>`)
            .join(""),
        ),
      "read",
    ],
    [
      "a name of markup, direction marks and 10,000 letters",
      () =>
        gpxDocument(points(3)).replace(
          "<trk>",
          `<trk><name>&lt;script&gt;\u202e☀\r\n${"n".repeat(10_000)}</name>`,
        ),
      "read",
    ],
  ])("%s", async (_, make, expected) => {
    expect(codeOf(await answer(make()))).toBe(expected);
  });

  it("a GPX file cut at every tenth: the whole fixes with a note, or a refusal", async () => {
    const bytes = fixtureBytes("gpx/run.gpx");
    let before = 0;
    for (let tenth = 1; tenth < 10; tenth++) {
      const outcome = await answer(bytes.subarray(0, Math.floor((bytes.length * tenth) / 10)));
      if (outcome.kind !== "read") throw new Error(outcome.error.message);
      expect(outcome.notes.map((note) => note.code)).toContain("cut_short");
      expect(outcome.fixes.count).toBeGreaterThan(before);
      // 206 fixes spread evenly over the file, the head takes less than one tenth.
      expect(Math.abs(outcome.fixes.count - (206 * tenth) / 10)).toBeLessThan(6);
      before = outcome.fixes.count;
    }
  });

  it.each([
    "tcx/two-laps.tcx",
    "kml/gx-track.kml",
    "fit/activity.fit",
    "archive/two-sessions.zip",
    "archive/morning.gpx.gz",
  ])("%s cut at every tenth", async (name) => {
    const bytes = fixtureBytes(name);
    for (let tenth = 1; tenth < 10; tenth++)
      await answer(bytes.subarray(0, Math.floor((bytes.length * tenth) / 10)));
  });

  it("1,000,001 fixes", async () => {
    const pt = '<trkpt lat="57.1" lon="9.2"><time>2025-06-14T10:00:00Z</time></trkpt>\n';
    const block = bytesOf(pt.repeat(10_000));
    async function* million(): AsyncGenerator<Uint8Array> {
      yield bytesOf(HEAD);
      for (let block10k = 0; block10k < 100; block10k++) yield block;
      yield bytesOf(pt + TAIL);
    }
    const started = performance.now();
    const [outcome] = await readFile(million(), { fileName: "x.gpx" });
    expect(outcome && codeOf(outcome)).toBe("too_many_fixes");
    // 75 MB; the 3 s are for a machine of its own, the suite shares two cores with others.
    expect(performance.now() - started).toBeLessThan(3 * ANSWER_MS);
  });

  it("bombs in gzip and zip are stopped at the cap without filling the memory", async () => {
    const bomb = gzipSync(new Uint8Array(64 * 1024 * 1024).fill(0x20), { level: 9 });
    const many = new Uint8Array(bomb.length * 7);
    for (let copy = 0; copy < 7; copy++) many.set(bomb, copy * bomb.length);
    const before = process.memoryUsage().rss;
    expect(codeOf(await answer(many))).toBe("text_too_long");
    const zip = zipSync({
      "a.gpx": [bytesOf(HEAD + `<!--x-->${" ".repeat(1000)}`), { level: 9 }],
      "b.gpx": many,
    });
    await answer(zip);
    const comments = gzipSync(bytesOf(HEAD + "<!-- -->".repeat(4_000_000)), { level: 1 });
    const [outcome] = await readFile(comments, {
      fileName: "x",
      limits: { unpackedBytes: 16 * 1024 * 1024 },
    });
    expect(outcome && codeOf(outcome)).toBe("too_large_unpacked");
    expect(process.memoryUsage().rss - before).toBeLessThan(400 * 1024 * 1024);
  });

  it("a zip of 10,000 files", async () => {
    const files = Object.fromEntries(
      Array.from({ length: 10_000 }, (_, n) => [
        `${n}.gpx`,
        [strToU8("x"), { level: 0 }] as [Uint8Array, { level: 0 }],
      ]),
    );
    expect(codeOf(await answer(zipSync(files)))).toBe("too_many_files");
  });

  it("never asks the network for what a document names", async () => {
    let hits = 0;
    const server = createServer((_, response) => {
      hits++;
      response.end();
    });
    await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
    const address = server.address();
    const port = typeof address === "object" && address !== null ? address.port : 0;
    const url = `http://127.0.0.1:${port}/x`;
    await answer(doctype(`SYSTEM "${url}.dtd" [<!ENTITY a SYSTEM "${url}">]`, "&a;"));
    await answer(gpxDocument(points(3)).replace("<gpx", `<gpx xmlns:xsi="x" xsi:schemaLocation="a ${url}"`));
    await new Promise<void>((resolve) => server.close(() => resolve()));
    expect(hits).toBe(0);
  });
});
