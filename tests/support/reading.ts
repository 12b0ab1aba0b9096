import fs from "node:fs";
import path from "node:path";
import { expect } from "vitest";
import { readFile, type FileRead, type FileRefused, type ReadOptions } from "@/lib/formats/read-file";

const ROOT = path.resolve(import.meta.dirname, "../..");

export const fixturePath = (name: string): string => path.join(ROOT, "fixtures", name);
export const fixtureBytes = (name: string): Uint8Array => new Uint8Array(fs.readFileSync(fixturePath(name)));
export const sharedPath = (name: string): string => path.resolve(ROOT, "../shared", name);

export const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);

type Source = Uint8Array | string;
type Options = Partial<ReadOptions>;
const toBytes = (source: Source): Uint8Array => (typeof source === "string" ? bytesOf(source) : source);

/** The one outcome of a file that must be read. */
export async function readOk(source: Source, options: Options = {}): Promise<FileRead> {
  const outcomes = await readFile(toBytes(source), { fileName: "track.gpx", ...options });
  expect(outcomes).toHaveLength(1);
  const [outcome] = outcomes;
  if (outcome?.kind !== "read") throw new Error(`refused: ${JSON.stringify(outcome)}`);
  return outcome;
}

/** The one outcome of a file that must be refused. */
export async function readRefused(source: Source, options: Options = {}): Promise<FileRefused["error"]> {
  const outcomes = await readFile(toBytes(source), { fileName: "track.gpx", ...options });
  expect(outcomes).toHaveLength(1);
  const [outcome] = outcomes;
  if (outcome?.kind !== "refused") throw new Error("the file was read");
  return outcome.error;
}

export const noteCount = (read: FileRead, code: string): number =>
  read.notes.find((note) => note.code === code)?.count ?? 0;

/** A small GPX 1.1 document around segments of points. */
export function gpxDocument(...segments: string[]): string {
  const body = segments.map((points) => `<trkseg>${points}</trkseg>`).join("");
  return (
    `<?xml version="1.0" encoding="UTF-8"?><gpx version="1.1" creator="test" ` +
    `xmlns="http://www.topografix.com/GPX/1/1"><trk>${body}</trk></gpx>`
  );
}

/** Point number `index` of a made track: one a second, a few metres apart. */
export function point(
  index: number,
  inner = "",
  lat = 57.1 + index * 1e-5,
  lon: number | string = 9.2,
): string {
  const time = new Date(Date.UTC(2025, 5, 14, 10, 0, index)).toISOString();
  return `<trkpt lat="${typeof lat === "number" ? lat.toFixed(6) : lat}" lon="${lon}"><time>${time}</time>${inner}</trkpt>`;
}

export const points = (count: number, from = 0): string =>
  Array.from({ length: count }, (_, index) => point(from + index)).join("");

/** Rows of a simple CSV (quotes doubled, no line breaks in fields) as records by its head. */
export function csvRows(name: string): Record<string, string>[] {
  const lines = fs.readFileSync(fixturePath(name), "utf8").trimEnd().split(/\r?\n/);
  const split = (line: string): string[] =>
    [...line.matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g)].map(([, quoted, plain]) =>
      quoted === undefined ? (plain ?? "") : quoted.replaceAll('""', '"'),
    );
  const head = split(lines[0] ?? "");
  return lines.slice(1).map((line) => {
    const cells = split(line);
    return Object.fromEntries(head.map((key, index) => [key, cells[index] ?? ""]));
  });
}
