import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { Discipline } from "./analysis";
import { median } from "@/lib/numeric/quantile";
import type { Run } from "@/lib/numeric/runs";

/** Take-off and touchdown as fractional sample indices. */
export type FoilEdges = { readonly start: number; readonly end: number };

/** The board leaves the water at this multiple of stall; with a hand wing a little later. Trials, no source. */
const TAKEOFF_OVER_STALL = 1.14;
const TAKEOFF_OVER_STALL_POWERED = 1.2;
const TOUCHDOWN_OVER_STALL = 1.02;
/** A fall brakes harder than this (m/s2) and passes the last quarter above stall quickly. Trials, no source. */
const FALL_MPS2 = 1.7;
const FALL_QUICK_S = 1.3;
/** How much the smoother blunts the deceleration of a fall. */
const BLUNTING = 1.5;

type Slope = (index: number) => number;

/** Speed lost per second around a sample (m/s2), over a second. */
function decelerationOf(track: SmoothedTrack): Slope {
  const half = Math.max(1, Math.round(500 / track.stepMs));
  const span = (2 * half * track.stepMs) / 1000;
  return (i) =>
    i < half || i >= track.count - half
      ? 0
      : ((track.speedMps[i - half] ?? 0) - (track.speedMps[i + half] ?? 0)) / span;
}

/** Index, between samples i-1 and i, at which the speed passes the level. */
function crossing(track: SmoothedTrack, i: number, levelMps: number): number {
  const before = track.speedMps[i - 1] ?? levelMps;
  const after = track.speedMps[i] ?? levelMps;
  const rise = after - before;
  return rise === 0 ? i : i - 1 + Math.max(0, Math.min(1, (levelMps - before) / rise));
}

/** The take-off: the passing of the take-off speed that lies nearest to the beginning of the run. */
function takeoffIndex(track: SmoothedTrack, run: Run, levelMps: number): number {
  const reach = Math.round(6000 / track.stepMs);
  const speed = (i: number): number => track.speedMps[i] ?? 0;
  let i = run.from;
  if (speed(i) < levelMps) {
    const limit = Math.min(run.to, run.from + reach);
    while (i < limit && speed(i) < levelMps) i++;
    return speed(i) >= levelMps ? crossing(track, i, levelMps) : run.from;
  }
  const limit = Math.max(0, run.from - reach);
  while (i > limit && speed(i - 1) >= levelMps) i--;
  return i > 0 && speed(i - 1) < levelMps ? crossing(track, i, levelMps) : run.from;
}

/** The sample of hardest braking near an index. */
function hardestBraking(around: number, run: Run, context: EdgeContext): number {
  const { track, deceleration } = context;
  let hardest = around;
  const from = Math.max(run.from, around - Math.round(2000 / track.stepMs));
  const to = Math.min(track.count - 1, around + Math.round(2500 / track.stepMs));
  for (let i = from; i < to; i++) if (deceleration(i) > deceleration(hardest)) hardest = i;
  return hardest;
}

/** A fall: braking begins at the speed ridden just before; the onset is drawn back along the blunted slope. */
function fallIndex(hardest: number, run: Run, context: EdgeContext): number {
  const { track, deceleration } = context;
  const before: number[] = [];
  const from = Math.max(run.from + 1, hardest - Math.round(6000 / track.stepMs));
  for (let i = from; i < hardest - Math.round(2000 / track.stepMs); i++) before.push(track.speedMps[i] ?? 0);
  const here = track.speedMps[hardest] ?? 0;
  const ridden = before.length > 0 ? median(before) : here;
  const backS = Math.max(0, (ridden - here) / (deceleration(hardest) * BLUNTING));
  return hardest - (backS * 1000) / track.stepMs;
}

type EdgeContext = {
  readonly track: SmoothedTrack;
  readonly deceleration: Slope;
  readonly stallMps: number;
  readonly discipline: Discipline;
};

function touchdownIndex(run: Run, context: EdgeContext): number {
  const { track, stallMps, deceleration } = context;
  const level = stallMps * TOUCHDOWN_OVER_STALL;
  const speed = (i: number): number => track.speedMps[i] ?? 0;
  let i = run.to;
  const limit = Math.min(track.count - 1, run.to + Math.round(4000 / track.stepMs));
  while (i < limit && speed(i) > level) i++;
  while (i > run.from && speed(i) < level) i--;
  const hardest = hardestBraking(i, run, context);
  let reserve = i;
  const reach = Math.round(7000 / track.stepMs);
  while (reserve > run.from && speed(reserve) < 1.25 * stallMps && i - reserve < reach) reserve--;
  const quick = ((i - reserve) * track.stepMs) / 1000 < FALL_QUICK_S;
  if (deceleration(hardest) > FALL_MPS2 && deceleration(reserve) > 1.3 && quick) {
    return fallIndex(hardest, run, context);
  }
  // On bumps a stalling rider sinks on for a moment before the hull bites.
  const sinkS = context.discipline === "downwind" ? 0.45 : -0.05;
  return i + (sinkS * 1000) / track.stepMs;
}

/**
 * Take-off and touchdown of a run of on-foil samples, placed by what the speed does there.
 *
 * Take-off: the smoothed speed passes 1.14 (hand wing: 1.2) times stall. Touchdown by a fall (hard braking from
 * riding speed): the onset of braking, drawn back along its slope; by a stall: the passing of 1.02 times stall.
 * In: the track, the run (sample indices), the stall speed (m/s), the discipline. Out: fractional indices inside
 * the track; the end is never before the start. The multiples come from trials on modelled sessions.
 */
export function placeEdges(
  track: SmoothedTrack,
  run: Run,
  options: { readonly stallMps: number; readonly discipline: Discipline },
): FoilEdges {
  const context: EdgeContext = { track, deceleration: decelerationOf(track), ...options };
  const multiple = options.discipline === "wing" ? TAKEOFF_OVER_STALL_POWERED : TAKEOFF_OVER_STALL;
  const start = takeoffIndex(track, run, options.stallMps * multiple);
  const end = touchdownIndex(run, context);
  return { start, end: Math.max(start, Math.min(track.count - 1, end)) };
}
