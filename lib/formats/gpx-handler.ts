import type { ParseError } from "@/lib/errors/parse-error";
import { gpxConverter } from "./togeojson-facade";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import { TrackHandler } from "./track-handler";
import type { TagName } from "./xml-tokenizer";

const OTHER = 0;
const TRACK = 1;
const SEGMENT = 2;
const POINT = 3;
const ROUTE = 4;
const WAYPOINT = 5;
const NAME = 6;
const METADATA = 7;
const ELEVATION = 8;
const TIME = 9;
const HEART_RATE = 10;
const SPEED = 11;
const HDOP = 12;
const SATELLITES = 13;
const EXTENSIONS = 14;

const CODES: Readonly<Record<string, number>> = {
  trk: TRACK,
  trkseg: SEGMENT,
  trkpt: POINT,
  rte: ROUTE,
  wpt: WAYPOINT,
  name: NAME,
  metadata: METADATA,
  ele: ELEVATION,
  time: TIME,
  hr: HEART_RATE,
  heart: HEART_RATE,
  heartrate: HEART_RATE,
  heartratebpm: HEART_RATE,
  speed: SPEED,
  hdop: HDOP,
  sat: SATELLITES,
  extensions: EXTENSIONS,
};
// Fields that togeojson, which looks at any depth, would take from a foreign extension too.
const DIRECT_ONLY = new Set([ELEVATION, TIME]);

/**
 * GPX 1.0 and 1.1 as it streams by. Tags count by their local names, so no, odd and undeclared prefixes read
 * alike. Per point: position, `ele` and `time` as direct children; `speed` (1.0) and `hdop`, `sat` as
 * children; heart rate and speed in extensions of any prefix and depth.
 *
 * Source: GPX 1.0 and 1.1 schemas; Garmin TrackPointExtension v1 and v2 schemas (hr; speed in m/s).
 */
export class GpxHandler extends TrackHandler {
  override readonly format = "gpx";
  tracks = 0;
  points = 0;
  private routes = 0;
  private trackDepth = 0;
  private metadataDepth = 0;
  private pointDepth = 0;
  private segmentHasPoint = false;
  private field = OTHER;
  private fieldDepth = 0;
  private metadataTitle: string | null = null;

  constructor(budget: ReadBudget) {
    super(gpxConverter(), budget);
  }

  override codeOf(local: string): number {
    return CODES[local] ?? CODES[local.toLowerCase().replaceAll(/[_-]/g, "")] ?? OTHER;
  }

  override open(name: TagName, attributes: readonly string[], depth: number): void {
    if (this.pointDepth > 0) return this.openInPoint(name, attributes, depth);
    const code = name.code;
    if (code === POINT) return this.openPoint(attributes, depth);
    if (depth === 1) return this.lookAtRoot(name, attributes);
    this.lookAtNames(name, attributes);
    if (code === SEGMENT || code === TRACK) {
      this.sink.startSegment();
      this.segmentHasPoint = false;
      if (code === TRACK) this.tracks++;
      if (code === TRACK) this.trackDepth = depth;
    } else if (code === METADATA) this.metadataDepth = depth;
    else if (code === ROUTE) this.routes++;
    else if (code === WAYPOINT) this.sink.notes.add("waypoints_ignored");
    else if (code === NAME && this.mayName(depth)) this.gather(NAME, depth);
  }

  override close(_name: TagName, depth: number): void {
    if (depth === this.fieldDepth && this.field !== OTHER) return this.closeField();
    if (depth === this.pointDepth) {
      this.pointDepth = 0;
      this.sink.commit();
      this.sink.draft.clear();
    } else if (depth === this.trackDepth) this.trackDepth = 0;
    else if (depth === this.metadataDepth) this.metadataDepth = 0;
    else if (depth === 1) {
      this.title ??= this.metadataTitle;
      this.sink.notes.add("routes_ignored", this.routes);
    }
  }

  protected override planOnly(): ParseError | null {
    const waypoints = this.sink.notes.count("waypoints_ignored");
    if (this.routes === 0 && waypoints === 0) return null;
    const found =
      this.routes > 0 ? "It holds a route without times" : "It holds waypoints only, without times";
    return refusal("no_times", { format: this.format, found });
  }

  /** A name counts for the track or the file (1.0: child of the root), never for a point of either. */
  private mayName(depth: number): boolean {
    return depth === 2 || (this.trackDepth > 0 && depth === this.trackDepth + 1) || this.inMetadata(depth);
  }

  private inMetadata(depth: number): boolean {
    return this.metadataDepth > 0 && depth === this.metadataDepth + 1;
  }

  private openPoint(attributes: readonly string[], depth: number): void {
    this.pointDepth = depth;
    this.points++;
    if (!this.segmentHasPoint) {
      this.segmentHasPoint = true;
      this.rawSegments++;
    }
    const draft = this.sink.draft;
    for (let at = 0; at < attributes.length; at += 2) {
      const attribute = attributes[at];
      if (attribute === "lat") draft.lat = attributes[at + 1] ?? "";
      else if (attribute === "lon") draft.lon = attributes[at + 1] ?? "";
    }
  }

  private openInPoint(name: TagName, attributes: readonly string[], depth: number): void {
    if (attributes.length > 0 || name.prefix !== "") this.lookAtNames(name, attributes);
    const code = name.code;
    if (code < ELEVATION || code > SATELLITES || this.field !== OTHER) return;
    if (DIRECT_ONLY.has(code) && depth !== this.pointDepth + 1) return;
    this.gather(code, depth);
  }

  private gather(field: number, depth: number): void {
    this.field = field;
    this.fieldDepth = depth;
    this.gathered = "";
    this.wantsText = true;
  }

  private closeField(): void {
    const text = this.gathered.charCodeAt(0) > 32 ? this.gathered : this.gathered.trim();
    const draft = this.sink.draft;
    switch (this.field) {
      case ELEVATION:
        if (draft.elevation === "") draft.elevation = text;
        break;
      case TIME:
        if (draft.time === "") draft.time = text;
        break;
      case HEART_RATE:
        if (draft.heartRate === "") draft.heartRate = text;
        break;
      case SPEED:
        if (draft.speed === "") draft.speed = text;
        break;
      case HDOP:
        if (draft.hdop === "") draft.hdop = text;
        break;
      case SATELLITES:
        if (draft.satellites === "") draft.satellites = text;
        break;
      case NAME:
        this.closeName();
        break;
    }
    this.field = OTHER;
    this.wantsText = false;
    this.gathered = "";
  }

  private closeName(): void {
    if (this.trackDepth > 0) return this.takeTitle();
    const kept = this.title;
    this.title = null;
    this.takeTitle();
    this.metadataTitle ??= this.title;
    this.title = kept;
  }
}
