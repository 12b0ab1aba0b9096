import { cleanFixes } from "./clean-fixes";
import type { Fixes, TrackNote } from "./fixes";
import { heightRangeM } from "./height-range";
import { findOnWater, type OnWater } from "./on-water";
import type { PreparedTrack, PrepareOptions } from "./prepared-track";
import { qualityReport } from "./quality-grade";
import { rawLengthM } from "./raw-length";
import { smoothTrack, type Smoothing } from "./smooth-track";
import type { SmoothedTrack } from "./smoothed-track";
import type { Stretch } from "./speed-series";

/** Level water shows no such range of height, however poor the receiver (common practice, no source). */
const LAND_HEIGHT_M = 40;
const RIDING_MPS = 2;
/** At walking pace a wet barometer may lie, so more is asked. */
const LAND_HEIGHT_M_SLOW = 150;
const WALKING_MPS = 0.5;

/**
 * From raw fixes to everything the analysis works on: cleaned, graded, smoothed onto a fine uniform clock, and told from the land. With `trim` the
 * rider's own ends hold: what lies outside is off the water, what lies inside at either end is on it, and only breaks found in
 * between are left out. A track whose height changes like a hillside has no times on the water unless the rider sets the ends. Never throws on data: without at least two believable fixes the smoothed track is empty, there are no times on the
 * water, and the quality report says why. Times and memory grow linearly with the fixes.
 */
export function prepareTrack(fixes: Fixes, options: PrepareOptions): PreparedTrack {
  const cleaned = cleanFixes(fixes);
  const smoothing = smoothTrack(cleaned.fixes, cleaned.medianStepS);
  const water = findOnWater(smoothing.smoothed, smoothing.noiseScaleM);
  const landM = landHeightM(cleaned.fixes, smoothing.smoothed);
  const waterSessions = trimSessions(landM > 0 ? [] : water.sessions, options.trim, smoothing.smoothed);
  markOnWater(smoothing.smoothed, waterSessions);
  const quality = qualityReport(cleaned, smoothing, fixes.count);
  const firstFixMs = cleaned.fixes.timeMs[0] ?? NaN;
  const lastFixMs = cleaned.fixes.timeMs[cleaned.fixes.count - 1] ?? NaN;
  return {
    cleaned: cleaned.fixes,
    smoothed: smoothing.smoothed,
    window: windowOf(water.sessions, options.trim, smoothing.smoothed),
    waterSessions,
    quality: { ...quality, notes: [...quality.notes, ...findings(smoothing, water, landM)] },
    rawLengthM: rawLengthM(fixes),
    rawFixes: fixes.count,
    rawSegments: fixes.segmentStarts.length,
    firstFixMs,
    lastFixMs,
  };
}

/** Range of height in metres that no open water has, or 0. */
function landHeightM(fixes: Fixes, track: SmoothedTrack): number {
  const speedAt = (timeMs: number) =>
    track.speedMps[Math.round((timeMs - track.startMs) / track.stepMs)] ?? NaN;
  const ridingM = heightRangeM(fixes, speedAt, RIDING_MPS);
  if (ridingM > LAND_HEIGHT_M) return ridingM;
  const walkingM = heightRangeM(fixes, speedAt, WALKING_MPS);
  return walkingM > LAND_HEIGHT_M_SLOW ? walkingM : 0;
}

/** The detected times inside the rider's own ends, reaching to those ends; the whole stretch when none is inside. */
function trimSessions(
  sessions: readonly Stretch[],
  trim: Stretch | null,
  track: SmoothedTrack,
): readonly Stretch[] {
  if (trim === null || track.count === 0) return sessions;
  const lastMs = track.startMs + (track.count - 1) * track.stepMs;
  const startMs = Math.max(trim.startMs, track.startMs);
  const endMs = Math.min(trim.endMs, lastMs);
  if (endMs <= startMs) return [];
  const inside = sessions
    .map((s) => ({ startMs: Math.max(s.startMs, startMs), endMs: Math.min(s.endMs, endMs) }))
    .filter((s) => s.endMs > s.startMs);
  if (inside.length === 0) return [{ startMs, endMs }];
  return inside.map((s, i) => ({
    startMs: i === 0 ? startMs : s.startMs,
    endMs: i === inside.length - 1 ? endMs : s.endMs,
  }));
}

function windowOf(sessions: readonly Stretch[], trim: Stretch | null, track: SmoothedTrack): Stretch {
  if (trim !== null) return { startMs: trim.startMs, endMs: trim.endMs };
  const startMs = sessions[0]?.startMs ?? track.startMs;
  return { startMs, endMs: sessions.at(-1)?.endMs ?? startMs };
}

function markOnWater(track: SmoothedTrack, sessions: readonly Stretch[]): void {
  track.onWater.fill(0);
  for (const s of sessions) {
    const from = Math.max(0, Math.ceil((s.startMs - track.startMs) / track.stepMs));
    const to = Math.min(track.count, Math.floor((s.endMs - track.startMs) / track.stepMs) + 1);
    if (to > from) track.onWater.fill(1, from, to);
  }
}

function findings(smoothing: Smoothing, water: OnWater, landHeightM: number): TrackNote[] {
  const notes: TrackNote[] = [];
  const add = (code: string, count: number, text: string) => notes.push({ code, count, text });
  if (smoothing.smoothed.count === 0) {
    add("too_short", 1, "There are not enough believable fixes to work with.");
    return notes;
  }
  if (smoothing.receiverSpeed === "disagrees") {
    add("receiver_speed_ignored", 1, "The speed in the file does not follow the positions and was not used.");
  }
  if (water.drives > 0)
    add("drive", water.drives, water.drives === 1 ? "1 drive cut off." : `${water.drives} drives cut off.`);
  if (landHeightM > 0) {
    const height = Math.round(landHeightM);
    add(
      "land",
      1,
      `The height changes by ${height} m, so this is hardly open water. Set the ends by hand if it is.`,
    );
  } else if (!water.foilLike) {
    add("slow", 1, "Nothing here moves like a foil: only rest at the ends and driving were cut off.");
  }
  return notes;
}
