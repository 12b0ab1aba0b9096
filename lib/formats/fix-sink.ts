import { FixColumns, type OptionalColumn } from "@/lib/track/fix-columns";
import type { Fixes } from "@/lib/track/fixes";
import { FixDraft, type ConvertedFixes, type FixConverter } from "./fix-draft";
import { hasZone, parseDateTime } from "./parse-date-time";
import { parseDecimal } from "./parse-decimal";
import type { ReadBudget } from "./read-limits";
import { TrackNotes } from "./track-notes";

/** Small enough to stay in the processor's cache, large enough that togeojson's set-up does not count. */
const BATCH = 256;
/** No satellite receiver knows an earlier date. Source: IS-GPS-200, 3.3.4 (GPS epoch 1980-01-06). */
const EARLIEST_MS = Date.UTC(1980, 0, 6);
/** A recording from after this century is a clock that is wrong. Common practice, no source. */
const LATEST_MS = Date.UTC(2100, 0, 1);
/** A fix at exactly 0, 0 is real only when its neighbours are this near (degrees). Common practice, no source. */
const ZERO_NEAR_DEG = 2;

/** What a person, a board and a receiver can be; outside is missing. Common practice, no source. */
const PLAUSIBLE: Readonly<Record<OptionalColumn, { readonly low: number; readonly high: number }>> = {
  elevationM: { low: -12_000, high: 100_000 },
  heartRateBpm: { low: 1, high: 300 },
  receiverSpeedMps: { low: 0, high: 500 },
  hdop: { low: 0, high: 100 },
  satellites: { low: 0, high: 200 },
};

/** Numbers of a fix that was never text (FIT). NaN: missing. */
export type FixNumbers = {
  readonly timeMs: number;
  readonly latDeg: number;
  readonly lonDeg: number;
} & Partial<Readonly<Record<OptionalColumn, number>>>;

/**
 * The door every fix goes through: it is checked here, once, whatever the format; what passes goes by batches
 * through togeojson into the columns, what does not is dropped and counted.
 *
 * Shapes: fill `draft`, call `commit`; `startSegment` before the first fix of a recorded segment. `finish`
 * gives the columns and drops the 0, 0 of a receiver that did not know its place yet.
 * Domain: times from 1980 to 2099, latitude -90 to 90, longitude -180 to 180 (180 itself too, which GPX 1.1
 * forbids but GPX 1.0 and receivers know). Errors: ParseError `too_many_fixes`.
 */
export class FixSink {
  readonly notes = new TrackNotes();
  readonly draft = new FixDraft();
  private readonly drafts = Array.from({ length: BATCH }, () => new FixDraft());
  private waiting = 0;
  private readonly columns = new FixColumns();
  private readonly convert: FixConverter;
  private readonly budget: ReadBudget;
  private zeros = 0;
  private pendingRows = 0;

  constructor(convert: FixConverter, budget: ReadBudget) {
    this.convert = convert;
    this.budget = budget;
  }

  /** Fixes accepted so far. */
  get count(): number {
    return this.pendingRows;
  }

  startSegment(): void {
    this.flush();
    this.columns.startSegment();
  }

  /** Checks the draft and takes it or drops it; returns the row it will have, or -1. */
  commit(): number {
    const draft = this.draft;
    const lat = parseDecimal(draft.lat);
    const lon = parseDecimal(draft.lon);
    if (!this.positionIsGood(lat, lon, draft.lat === "" || draft.lon === "")) return -1;
    if (draft.time === "") return this.drop("no_time");
    draft.timeMs = parseDateTime(draft.time);
    if (!this.timeIsGood(draft.timeMs)) return -1;
    if (!hasZone(draft.time)) this.notes.add("zone_missing");
    draft.elevation = this.checked("elevationM", draft.elevation);
    draft.heartRate = this.checked("heartRateBpm", draft.heartRate);
    draft.speed = this.checked("receiverSpeedMps", draft.speed);
    draft.hdop = this.checked("hdop", draft.hdop);
    draft.satellites = this.checked("satellites", draft.satellites);
    if (lat === 0 && lon === 0) this.zeros++;
    this.budget.spendFix();
    (this.drafts[this.waiting++] as FixDraft).copy(draft);
    if (this.waiting === BATCH) this.flush();
    return this.pendingRows++;
  }

  /** The same door for a fix that comes as numbers. */
  commitNumbers(fix: FixNumbers): void {
    if (!this.positionIsGood(fix.latDeg, fix.lonDeg, Number.isNaN(fix.latDeg) || Number.isNaN(fix.lonDeg))) {
      return;
    }
    if (Number.isNaN(fix.timeMs)) return void this.drop("no_time");
    if (!this.timeIsGood(fix.timeMs)) return;
    this.budget.spendFix();
    if (fix.latDeg === 0 && fix.lonDeg === 0) this.zeros++;
    const row = this.columns.append(fix.timeMs, fix.latDeg, fix.lonDeg);
    for (const column of Object.keys(PLAUSIBLE) as OptionalColumn[]) {
      const value = fix[column];
      if (value !== undefined) this.set(column, row, value);
    }
    this.pendingRows++;
  }

  /** Sets a quantity of a fix taken earlier (KML states heart rates after all positions). */
  setLater(column: OptionalColumn, row: number, text: string): void {
    this.flush();
    if (text.trim() !== "") this.set(column, row, parseDecimal(text));
  }

  finish(): Fixes {
    this.flush();
    return this.columns.finish(this.zeros === 0 ? null : this.strayZeros());
  }

  private set(column: OptionalColumn, row: number, value: number): void {
    if (Number.isNaN(value)) return;
    const { low, high } = PLAUSIBLE[column];
    if (value >= low && value <= high) this.columns.set(column, row, value);
    else this.notes.add("bad_values");
  }

  private drop(
    code: "no_time" | "bad_time" | "no_position" | "bad_position" | "out_of_range" | "clock_not_set",
  ) {
    this.notes.add(code);
    return -1 as const;
  }

  private positionIsGood(lat: number, lon: number, missing: boolean): boolean {
    if (lat >= -90 && lat <= 90 && lon >= -180 && lon <= 180) return true;
    this.drop(
      missing ? "no_position" : Number.isNaN(lat) || Number.isNaN(lon) ? "bad_position" : "out_of_range",
    );
    return false;
  }

  private timeIsGood(timeMs: number): boolean {
    if (timeMs >= EARLIEST_MS && timeMs < LATEST_MS) return true;
    this.drop(Number.isNaN(timeMs) ? "bad_time" : "clock_not_set");
    return false;
  }

  /** The text when it is a plausible number, else "" (and counted). */
  private checked(column: OptionalColumn, text: string): string {
    if (text === "") return text;
    const value = parseDecimal(text);
    const { low, high } = PLAUSIBLE[column];
    if (value >= low && value <= high) return text;
    this.notes.add("bad_values");
    return "";
  }

  private flush(): void {
    const count = this.waiting;
    if (count === 0) return;
    this.waiting = 0;
    // A line of GeoJSON has two points or more: a single fix goes through twice and is taken once.
    if (count === 1) (this.drafts[1] as FixDraft).copy(this.drafts[0] as FixDraft);
    this.take(this.convert(this.drafts, Math.max(2, count)), count);
  }

  private take(converted: ConvertedFixes, count: number): void {
    const { coordinates, heartRate, speed, hdop, satellites } = converted;
    const { columns, drafts } = this;
    for (let index = 0; index < count; index++) {
      const position = coordinates[index] as readonly number[];
      const elevation = position[2];
      const row = columns.append(
        (drafts[index] as FixDraft).timeMs,
        position[1] as number,
        position[0] as number,
      );
      if (elevation !== undefined) columns.set("elevationM", row, elevation);
      if (heartRate !== undefined) columns.set("heartRateBpm", row, heartRate[index] ?? Number.NaN);
      if (speed !== undefined) columns.set("receiverSpeedMps", row, speed[index] ?? Number.NaN);
      if (hdop !== undefined) columns.set("hdop", row, hdop[index] ?? Number.NaN);
      if (satellites !== undefined) columns.set("satellites", row, satellites[index] ?? Number.NaN);
    }
  }

  /** Marks runs of fixes at exactly 0, 0 that have no neighbour near there. */
  private strayZeros(): Uint8Array {
    const { columns } = this;
    const dropped = new Uint8Array(columns.count);
    const isZero = (row: number) => columns.latDegAt(row) === 0 && columns.lonDegAt(row) === 0;
    const isNear = (row: number) =>
      row >= 0 &&
      row < dropped.length &&
      Math.max(Math.abs(columns.latDegAt(row)), Math.abs(columns.lonDegAt(row))) < ZERO_NEAR_DEG;
    for (let row = 0; row < dropped.length; row++) {
      if (!isZero(row)) continue;
      let end = row + 1;
      while (end < dropped.length && isZero(end)) end++;
      if (!isNear(row - 1) && !isNear(end)) {
        dropped.fill(1, row, end);
        this.notes.add("zero_position", end - row);
      }
      row = end;
    }
    return dropped;
  }
}
