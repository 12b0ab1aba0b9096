import { DOMImplementation, XMLSerializer } from "@xmldom/xmldom";
import type { Fixes } from "@/lib/track/fixes";

const GPX = "http://www.topografix.com/GPX/1/1";
const POINT_EXTENSION = "http://www.garmin.com/xmlschemas/TrackPointExtension/v2";
const SPLIT = "fixes-stand-here";
const PIECE_CHARACTERS = 64 * 1024;
/** 1e-9 degree is 0.1 mm. */
const POSITION_DECIMALS = 9;

function decimal(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  const trimmed = text.includes(".") ? text.replace(/\.?0+$/, "") : text;
  return trimmed === "-0" ? "0" : trimmed;
}

function known(column: Float64Array | null, index: number): number | null {
  const value = column?.[index];
  return value === undefined || Number.isNaN(value) ? null : value;
}

/** GPX 1.1 has -180 but no 180. */
function lonText(lonDeg: number): string {
  return decimal(lonDeg >= 180 ? lonDeg - 360 : lonDeg, POSITION_DECIMALS);
}

function pointText(fixes: Fixes, index: number): string {
  const lat = decimal(fixes.latDeg[index] ?? Number.NaN, POSITION_DECIMALS);
  const lon = lonText(fixes.lonDeg[index] ?? Number.NaN);
  const elevation = known(fixes.elevationM, index);
  const satellites = known(fixes.satellites, index);
  const hdop = known(fixes.hdop, index);
  const heartRate = known(fixes.heartRateBpm, index);
  const speed = known(fixes.receiverSpeedMps, index);
  let text = `<trkpt lat="${lat}" lon="${lon}">`;
  if (elevation !== null) text += `<ele>${decimal(elevation, 3)}</ele>`;
  text += `<time>${new Date(fixes.timeMs[index] ?? Number.NaN).toISOString()}</time>`;
  if (satellites !== null) text += `<sat>${decimal(satellites, 0)}</sat>`;
  if (hdop !== null) text += `<hdop>${decimal(hdop, 3)}</hdop>`;
  if (heartRate !== null || speed !== null) {
    text += "<extensions><gpxtpx:TrackPointExtension>";
    if (heartRate !== null) text += `<gpxtpx:hr>${decimal(heartRate, 0)}</gpxtpx:hr>`;
    if (speed !== null) text += `<gpxtpx:speed>${decimal(speed, 3)}</gpxtpx:speed>`;
    text += "</gpxtpx:TrackPointExtension></extensions>";
  }
  return `${text}</trkpt>\n`;
}

/** What stands before and behind the segments, escaped by the XML library. */
function frame(title: string | null): [string, string] {
  const document = new DOMImplementation().createDocument(GPX, "gpx");
  const root = document.documentElement;
  if (root === null) throw new Error("invariant: a new document has its root");
  root.setAttribute("version", "1.1");
  root.setAttribute("creator", "Trimwake");
  root.setAttribute("xmlns:gpxtpx", POINT_EXTENSION);
  const track = root.appendChild(document.createElementNS(GPX, "trk"));
  const name = title?.replaceAll(/\p{Cc}+|[\uD800-\uDFFF\uFFFE\uFFFF]/gu, " ").trim() ?? "";
  if (name !== "") {
    track.appendChild(document.createElementNS(GPX, "name")).appendChild(document.createTextNode(name));
  }
  track.appendChild(document.createComment(SPLIT));
  const [head = "", tail = ""] = new XMLSerializer().serializeToString(document).split(`<!--${SPLIT}-->`);
  return [`<?xml version="1.0" encoding="UTF-8"?>\n${head}`, `${tail}\n`];
}

/**
 * A track as GPX 1.1, valid against its schema, in pieces of text to be joined or streamed.
 *
 * Units: metres, m/s, beats per minute; times UTC to the millisecond; positions to 1e-9 degree. Missing
 * quantities are left out; heart rate and receiver speed stand in the usual point extension. A title loses
 * characters that XML does not know.
 * Errors: RangeError for a time that is no date. Source: GPX 1.1 schema; TrackPointExtension v2 schema.
 */
export function* writeGpx(fixes: Fixes, options: { readonly title: string | null }): Generator<string> {
  const [head, tail] = frame(options.title);
  let piece = head;
  for (let segment = 0; segment < fixes.segmentStarts.length; segment++) {
    piece += "<trkseg>\n";
    const end = fixes.segmentStarts[segment + 1] ?? fixes.count;
    for (let index = fixes.segmentStarts[segment] ?? end; index < end; index++) {
      piece += pointText(fixes, index);
      if (piece.length < PIECE_CHARACTERS) continue;
      yield piece;
      piece = "";
    }
    piece += "</trkseg>\n";
  }
  yield piece + tail;
}
