import type { Discipline } from "@/lib/analysis/analysis";
import type { PreparedTrack } from "@/lib/track/prepared-track";

/** A downwinder ends somewhere else: this far from its start (m), and this share of its way in a straight line. */
const APART_M_MIN = 3000;
const STRAIGHT_SHARE_MIN = 0.6;

/**
 * What was probably ridden, as a first word that the rider can change: downwind when the way over the water leads from one place to
 * another, wing when it comes back. Common practice, no source. An empty track is "other".
 */
export function guessDiscipline({ smoothed, window }: PreparedTrack): Discipline {
  const { count, startMs, stepMs, xM, yM, onWater } = smoothed;
  if (count === 0) return "other";
  const first = Math.max(0, Math.ceil((window.startMs - startMs) / stepMs));
  const last = Math.min(count - 1, Math.floor((window.endMs - startMs) / stepMs));
  const step = (i: number, j: number) => Math.hypot((xM[j] ?? 0) - (xM[i] ?? 0), (yM[j] ?? 0) - (yM[i] ?? 0));
  let way = 0;
  for (let i = first + 1; i <= last; i += 1) if (onWater[i] === 1) way += step(i - 1, i);
  const apart = step(first, last);
  return apart >= APART_M_MIN && apart >= STRAIGHT_SHARE_MIN * way ? "downwind" : "wing";
}
