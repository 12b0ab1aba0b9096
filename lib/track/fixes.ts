/**
 * A recorded track as columns: one typed array per quantity, all of length `count`, index = fix.
 * The order is the file's own; times may repeat or run backwards until `cleanFixes` has been over it.
 *
 * Units: `timeMs` UTC epoch milliseconds; latitude and longitude degrees on WGS84; metres; beats per minute;
 * metres per second. Optional columns are null when no fix of the file has the quantity, and NaN at a fix
 * that lacks it. `segmentStarts` holds the index of the first fix of each recorded segment, ascending,
 * beginning with 0 (empty for an empty track); a segment boundary is a gap in the recording.
 */
export type Fixes = {
  readonly count: number;
  readonly timeMs: Float64Array;
  readonly latDeg: Float64Array;
  readonly lonDeg: Float64Array;
  readonly elevationM: Float64Array | null;
  readonly heartRateBpm: Float64Array | null;
  readonly receiverSpeedMps: Float64Array | null;
  readonly hdop: Float64Array | null;
  readonly satellites: Float64Array | null;
  readonly segmentStarts: Uint32Array;
};

/** A word about what was dropped, repaired or ignored; `text` is a sentence for the rider. */
export type TrackNote = { readonly code: string; readonly count: number; readonly text: string };
