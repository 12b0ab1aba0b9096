import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { OnFoilSegment } from "./analysis";
import type { FoilSpan } from "./on-foil";
import { valueAt } from "./value-at";

/** The effort before a take-off is looked for this far back (s); a fall-back of this much (m/s) ends the search. */
const EFFORT_S_MAX = 30;
const EFFORT_FALLBACK_MPS = 0.4;

/** Seconds from the lowest speed since the speed last came down to the take-off. */
function takeoffEffortS(track: SmoothedTrack, start: number): number {
  const from = Math.floor(start);
  const limit = Math.max(0, from - Math.round((EFFORT_S_MAX * 1000) / track.stepMs));
  let lowest = from;
  for (let i = from; i >= limit; i--) {
    const speed = track.speedMps[i] ?? 0;
    const low = track.speedMps[lowest] ?? 0;
    if (speed < low) lowest = i;
    else if (speed > low + EFFORT_FALLBACK_MPS) break;
  }
  return ((start - lowest) * track.stepMs) / 1000;
}

function bearingDeg(track: SmoothedTrack, span: FoilSpan): number {
  const east = valueAt(track.xM, span.end) - valueAt(track.xM, span.start);
  const north = valueAt(track.yM, span.end) - valueAt(track.yM, span.start);
  return ((Math.atan2(east, north) * 180) / Math.PI + 360) % 360;
}

/**
 * The on-foil segments with their figures. Distance is the cumulated way between the ends, the mean speed that way by
 * the time, the maximum that of the loose speed, the bearing that of the straight line made good (degrees true).
 * Effort: seconds of rising speed before the take-off, from the lowest speed at most 30 s back.
 */
export function segmentsOf(
  track: SmoothedTrack,
  spans: readonly FoilSpan[],
  wayM: Float64Array,
): OnFoilSegment[] {
  return spans.map((span) => {
    const distanceM = valueAt(wayM, span.end) - valueAt(wayM, span.start);
    let fastest = 0;
    for (let i = Math.ceil(span.start); i <= span.end; i++) {
      fastest = Math.max(fastest, track.speedMpsLoose[i] ?? 0);
    }
    const timeS = ((span.end - span.start) * track.stepMs) / 1000;
    return {
      startMs: track.startMs + span.start * track.stepMs,
      endMs: track.startMs + span.end * track.stepMs,
      distanceM,
      speedMpsMean: distanceM / timeS,
      speedMpsMax: fastest,
      bearingDeg: bearingDeg(track, span),
      confidence: span.confidence,
      takeoffEffortS: takeoffEffortS(track, span.start),
    };
  });
}
