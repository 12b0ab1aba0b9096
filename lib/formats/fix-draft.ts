/** One fix as a file states it: plain texts, "" for what is missing; `timeMs` is filled in when it is checked. */
export class FixDraft {
  lat = "";
  lon = "";
  elevation = "";
  time = "";
  heartRate = "";
  speed = "";
  hdop = "";
  satellites = "";
  timeMs = Number.NaN;

  clear(): void {
    this.lat = this.lon = this.elevation = this.time = "";
    this.heartRate = this.speed = this.hdop = this.satellites = "";
  }

  /** Takes over everything another draft says. */
  copy(other: FixDraft): void {
    this.lat = other.lat;
    this.lon = other.lon;
    this.elevation = other.elevation;
    this.time = other.time;
    this.heartRate = other.heartRate;
    this.speed = other.speed;
    this.hdop = other.hdop;
    this.satellites = other.satellites;
    this.timeMs = other.timeMs;
  }
}

/** What togeojson made of a batch: one entry a fix, null or absent where a quantity is missing. */
export type ConvertedFixes = {
  readonly coordinates: readonly (readonly number[])[];
  readonly heartRate?: readonly (number | null)[];
  readonly speed?: readonly (number | null)[];
  readonly hdop?: readonly (number | null)[];
  readonly satellites?: readonly (number | null)[];
};

/** Turns the first `count` checked drafts (two or more) into numbers. */
export type FixConverter = (drafts: readonly FixDraft[], count: number) => ConvertedFixes;
