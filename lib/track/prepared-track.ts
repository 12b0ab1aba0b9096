import type { Fixes } from "@/lib/track/fixes";
import type { QualityReport } from "@/lib/track/quality";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { Stretch } from "@/lib/track/speed-series";

/**
 * What comes out of `prepareTrack`: everything the analysis needs, worked out once from the raw fixes.
 *
 * `cleaned` holds the fixes that were believed, times strictly rising. `window` is the on-water window: the rider's
 * own ends when they were given, else the first to the last time on the water. `waterSessions` are the times on
 * the water inside it, in order, not overlapping; empty when there is nothing to analyse. The raw figures
 * (`rawLengthM`, `rawFixes`, `rawSegments`) describe the file as read; `firstFixMs` and `lastFixMs` are the earliest and latest
 * believed times (NaN for a track without one).
 */
export type PreparedTrack = {
  readonly cleaned: Fixes;
  readonly smoothed: SmoothedTrack;
  readonly window: Stretch;
  readonly waterSessions: readonly Stretch[];
  readonly quality: QualityReport;
  readonly rawLengthM: number;
  readonly rawFixes: number;
  readonly rawSegments: number;
  readonly firstFixMs: number;
  readonly lastFixMs: number;
};

/** `trim` is the rider's own ends of the session, or null for the detected on-water window. */
export type PrepareOptions = { readonly trim: Stretch | null };
