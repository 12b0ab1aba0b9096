import type { ParseError } from "@/lib/errors/parse-error";
import type { OptionalColumn } from "@/lib/track/fix-columns";
import { kmlConverter } from "./togeojson-facade";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import { GATHERED_MAX, TrackHandler } from "./track-handler";
import type { TagName } from "./xml-tokenizer";

const OTHER = 0;
const PLACEMARK = 1;
const TRACK = 2;
const WHEN = 3;
const COORD = 4;
const POINT = 5;
const LINE = 6;
const COORDINATES = 7;
const TIME_STAMP = 8;
const BEGIN = 9;
const END = 10;
const ARRAY_DATA = 11;
const VALUE = 12;
const NAME = 13;
const FOLDER = 14;

const CODES: Readonly<Record<string, number>> = {
  Placemark: PLACEMARK,
  Track: TRACK,
  when: WHEN,
  coord: COORD,
  Point: POINT,
  LineString: LINE,
  coordinates: COORDINATES,
  TimeStamp: TIME_STAMP,
  begin: BEGIN,
  end: END,
  SimpleArrayData: ARRAY_DATA,
  value: VALUE,
  name: NAME,
  Folder: FOLDER,
  Document: FOLDER,
};

function arrayColumn(name: string): OptionalColumn | null {
  const plain = name.toLowerCase().replaceAll(/[^a-z]/g, "");
  if (plain === "heartrate" || plain === "hr") return "heartRateBpm";
  return plain === "speed" ? "receiverSpeedMps" : null;
}

/**
 * KML as it streams by. Each `gx:Track` is a segment whose `when` and `coord` are paired in order, however
 * they are mixed; heart rates and speeds that follow as arrays are put to their fixes. Placemarks of one point
 * (or a line) with a time stamp or span become fixes, those that follow each other one segment.
 *
 * Source: OGC 07-147r2 (KML 2.2); KML extension namespace 2.2, gx:Track.
 */
export class KmlHandler extends TrackHandler {
  override readonly format = "kml";
  private field = OTHER;
  private fieldDepth = 0;
  private placemarkDepth = 0;
  private trackDepth = 0;
  private geometry = OTHER;
  private whens: string[] = [];
  private coords: string[] = [];
  private rows: number[] = [];
  private column: OptionalColumn | null = null;
  private columnAt = 0;
  private times: string[] = [];
  private path = "";
  private inPointRun = false;
  private placemarkHadTrack = false;
  private documentTitle: string | null = null;
  private placemarkName = "";

  constructor(budget: ReadBudget) {
    super(kmlConverter(), budget);
  }

  override codeOf(local: string): number {
    return CODES[local] ?? OTHER;
  }

  override open(name: TagName, attributes: readonly string[], depth: number): void {
    if (depth === 1) return this.lookAtRoot(name, attributes);
    if (attributes.length > 0 || name.prefix !== "") this.lookAtNames(name, attributes);
    if (this.field !== OTHER) return;
    if (this.trackDepth > 0) return this.openInTrack(name.code, attributes, depth);
    switch (name.code) {
      case PLACEMARK:
        this.placemarkDepth = depth;
        this.placemarkHadTrack = false;
        this.times = [];
        this.path = "";
        this.geometry = OTHER;
        return;
      case TRACK:
        this.openTrack(depth);
        return;
      case POINT:
      case LINE:
        this.geometry = name.code;
        return;
      case FOLDER:
        this.inPointRun = false;
        return;
      case NAME:
        return this.gather(NAME, depth);
      case WHEN:
      case BEGIN:
      case END:
        if (this.placemarkDepth > 0) this.gather(name.code, depth);
        return;
      case COORDINATES:
        if (this.geometry !== OTHER) this.gather(COORDINATES, depth);
    }
    if (name.code === ARRAY_DATA) this.openArray(attributes);
    else if (name.code === VALUE && this.column !== null) this.gather(VALUE, depth);
  }

  override close(name: TagName, depth: number): void {
    if (depth === this.fieldDepth && this.field !== OTHER) return this.closeField(depth);
    if (depth === this.trackDepth) this.closeTrack();
    else if (depth === this.placemarkDepth) this.closePlacemark();
    else if (name.code === ARRAY_DATA) this.column = null;
    else if (depth === 1) this.title ??= this.documentTitle;
  }

  protected override planOnly(): ParseError | null {
    const lines = this.sink.notes.count("lines_ignored");
    const places = this.sink.notes.count("waypoints_ignored");
    if (lines + places === 0) return null;
    const found = lines > 0 ? "It holds a drawn line without times" : "It holds places only, without times";
    return refusal("no_times", { format: this.format, found });
  }

  private openTrack(depth: number): void {
    this.trackDepth = depth;
    this.placemarkHadTrack = true;
    this.inPointRun = false;
    this.whens = [];
    this.coords = [];
    this.rows = [];
    this.sink.startSegment();
  }

  private openInTrack(code: number, attributes: readonly string[], depth: number): void {
    if (code === WHEN || code === COORD) this.gather(code, depth);
    else if (code === ARRAY_DATA) this.openArray(attributes);
    else if (code === VALUE && this.column !== null) this.gather(VALUE, depth);
  }

  private openArray(attributes: readonly string[]): void {
    const at = attributes.indexOf("name");
    this.column = at < 0 ? null : arrayColumn(attributes[at + 1] ?? "");
    this.columnAt = 0;
  }

  private gather(field: number, depth: number): void {
    this.field = field;
    this.fieldDepth = depth;
    this.gathered = "";
    this.wantsText = true;
  }

  private closeField(depth: number): void {
    const text = this.gathered.trim();
    if (this.trackDepth > 0) {
      if (this.field === WHEN) this.pair(this.whens, text);
      else if (this.field === COORD) this.pair(this.coords, text);
      else this.takeValue(text);
    } else if (this.field === COORDINATES) this.path = text;
    else if (this.field === VALUE) this.takeValue(text);
    else if (this.field === NAME) this.closeName(depth);
    else this.times.push(text);
    this.field = OTHER;
    this.wantsText = false;
    this.gathered = "";
  }

  private closeName(depth: number): void {
    if (this.placemarkDepth > 0 && depth === this.placemarkDepth + 1) {
      this.placemarkName = this.gathered;
      return;
    }
    const kept = this.title;
    this.title = null;
    this.takeTitle();
    this.documentTitle ??= this.title;
    this.title = kept;
  }

  private takeValue(text: string): void {
    const row = this.rows[this.columnAt++];
    if (this.column !== null && row !== undefined && row >= 0) this.sink.setLater(this.column, row, text);
  }

  /** Queues a time or a position and takes the fix once both are there. */
  private pair(queue: string[], text: string): void {
    queue.push(text);
    const index = this.rows.length;
    const when = this.whens[index];
    const coord = this.coords[index];
    if (when === undefined || coord === undefined) return;
    if (index === 0) this.rawSegments++;
    this.rows.push(this.commit(when, coord.split(/\s+/)));
    // What is paired is not needed again; the empty text keeps the index without keeping the memory.
    this.whens[index] = "";
    this.coords[index] = "";
  }

  private commit(when: string, parts: readonly string[]): number {
    const draft = this.sink.draft;
    draft.clear();
    draft.time = when;
    draft.lon = parts[0] ?? "";
    draft.lat = parts[1] ?? "";
    draft.elevation = parts[2] ?? "";
    return this.sink.commit();
  }

  private closeTrack(): void {
    this.trackDepth = 0;
    this.sink.notes.add("counts_differ", Math.abs(this.whens.length - this.coords.length));
    this.whens = [];
    this.coords = [];
  }

  private closePlacemark(): void {
    this.placemarkDepth = 0;
    if (this.placemarkHadTrack) {
      this.gathered = this.placemarkName;
      this.takeTitle();
      this.gathered = "";
    } else if (this.path !== "") this.takePlacemark();
    this.placemarkName = "";
  }

  /** A placemark without a gx:Track: its first point at its (first) time, its last at the end of its span. */
  private takePlacemark(): void {
    const [begin, end] = this.times;
    const whole = this.path.length < GATHERED_MAX;
    if (begin === undefined || !whole) {
      this.inPointRun = this.inPointRun && this.geometry === POINT;
      this.sink.notes.add(this.geometry === POINT ? "waypoints_ignored" : "lines_ignored");
      return;
    }
    if (!this.inPointRun) {
      this.sink.startSegment();
      this.rawSegments++;
      this.inPointRun = true;
    }
    const path = this.path.split(/\s+/);
    this.commit(begin, (path[0] ?? "").split(","));
    if (path.length < 2) return;
    if (end !== undefined) this.commit(end, (path.at(-1) ?? "").split(","));
    this.sink.notes.add("no_time", path.length - (end === undefined ? 1 : 2));
  }
}
