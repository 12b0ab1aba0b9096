import type { ParseError } from "@/lib/errors/parse-error";
import { tcxConverter } from "./togeojson-facade";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import { TrackHandler } from "./track-handler";
import type { TagName } from "./xml-tokenizer";

const OTHER = 0;
const TRACK = 1;
const POINT = 2;
const COURSE = 3;
const HEART_RATE = 4;
const TIME = 5;
const LATITUDE = 6;
const LONGITUDE = 7;
const ALTITUDE = 8;
const VALUE = 9;
const SPEED = 10;
const NOTES = 11;
const ACTIVITY = 12;

const CODES: Readonly<Record<string, number>> = {
  Track: TRACK,
  Trackpoint: POINT,
  Course: COURSE,
  HeartRateBpm: HEART_RATE,
  Time: TIME,
  LatitudeDegrees: LATITUDE,
  LongitudeDegrees: LONGITUDE,
  AltitudeMeters: ALTITUDE,
  Value: VALUE,
  Speed: SPEED,
  Notes: NOTES,
  Activity: ACTIVITY,
};

/**
 * TCX as it streams by: every `Track` of an activity's laps is a segment; courses are plans and are ignored.
 * Tags count by their local names.
 *
 * Source: Garmin Training Center Database v2 schema; Activity Extension v2 (Speed in m/s).
 */
export class TcxHandler extends TrackHandler {
  override readonly format = "tcx";
  private courses = 0;
  private courseDepth = 0;
  private pointDepth = 0;
  private activityDepth = 0;
  private heartDepth = 0;
  private segmentHasPoint = false;
  private field = OTHER;
  private fieldDepth = 0;

  constructor(budget: ReadBudget) {
    super(tcxConverter(), budget);
  }

  override codeOf(local: string): number {
    return CODES[local] ?? OTHER;
  }

  override open(name: TagName, attributes: readonly string[], depth: number): void {
    if (depth === 1) return this.lookAtRoot(name, attributes);
    if (attributes.length > 0 || name.prefix !== "") this.lookAtNames(name, attributes);
    if (this.courseDepth > 0 || name.code === OTHER) return;
    if (this.pointDepth > 0) return this.openInPoint(name.code, depth);
    switch (name.code) {
      case TRACK:
        this.sink.startSegment();
        this.segmentHasPoint = false;
        return;
      case POINT:
        this.pointDepth = depth;
        if (!this.segmentHasPoint) this.rawSegments++;
        this.segmentHasPoint = true;
        return;
      case COURSE:
        this.courses++;
        this.courseDepth = depth;
        return;
      case ACTIVITY:
        this.activityDepth = depth;
        return;
      case NOTES:
        if (depth === this.activityDepth + 1) this.gather(NOTES, depth);
    }
  }

  override close(_name: TagName, depth: number): void {
    if (depth === this.fieldDepth && this.field !== OTHER) return this.closeField();
    if (depth === this.heartDepth) this.heartDepth = 0;
    else if (depth === this.pointDepth) {
      this.pointDepth = 0;
      this.sink.commit();
      this.sink.draft.clear();
    } else if (depth === this.courseDepth) this.courseDepth = 0;
    else if (depth === 1) this.sink.notes.add("routes_ignored", this.courses);
  }

  protected override planOnly(): ParseError | null {
    if (this.courses === 0) return null;
    return refusal("no_times", {
      format: this.format,
      found: "It holds a course, a plan without recorded times",
    });
  }

  private openInPoint(code: number, depth: number): void {
    if (this.field !== OTHER) return;
    if (code === HEART_RATE) this.heartDepth = depth;
    else if (code === VALUE ? this.heartDepth > 0 : code >= TIME && code <= SPEED) this.gather(code, depth);
  }

  private gather(field: number, depth: number): void {
    this.field = field;
    this.fieldDepth = depth;
    this.gathered = "";
    this.wantsText = true;
  }

  private closeField(): void {
    const text = this.gathered.trim();
    const draft = this.sink.draft;
    if (this.field === TIME) draft.time = text;
    else if (this.field === LATITUDE) draft.lat = text;
    else if (this.field === LONGITUDE) draft.lon = text;
    else if (this.field === ALTITUDE) draft.elevation = text;
    else if (this.field === VALUE) draft.heartRate = text;
    else if (this.field === SPEED) draft.speed = text;
    else this.takeTitle();
    this.field = OTHER;
    this.wantsText = false;
    this.gathered = "";
  }
}
