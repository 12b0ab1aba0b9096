import { type Run, runs } from "@/lib/numeric/runs";

import { type CoarseMotion, coarseMotion } from "./coarse-motion";
import { findCar } from "./find-car";
import { findRest } from "./find-rest";
import { walkLengthS } from "./find-walk";
import type { SmoothedTrack } from "./smoothed-track";
import type { Stretch } from "./speed-series";

/** What was found: the times on the water in order, what was cut, and whether anything moved like a foil. */
export type OnWater = {
  readonly sessions: readonly Stretch[];
  readonly drives: number;
  readonly foilLike: boolean;
};

/** Mean speed over six seconds that only a foil, a sail or an engine keeps up on water. */
const RIDING_MPS = 2.8;
const RIDING_S = 5;
/** A session in which nothing reaches this for half a minute in all was on some slower craft. */
const FOIL_MPS = 4;
const FOIL_S_MIN = 30;
/** Shorter bursts are noise or a wave's push. */
const FLIGHT_S_MIN = 10;
/** A rest this long is a break ashore in the middle of a session, and this long at its ends. */
const BREAK_S = 100;
const END_REST_S = 12;
const SLOW_END_REST_S = 60;
/** A hole in the recording longer than this ends a time on the water. */
const HOLE_S = 600;
const SESSION_S_MIN = 60;
const RIDE_STRETCH_S_MIN = 100;
/** Without riding, a stretch shorter than this is a way ashore; a longer one is a paddle, unless somebody drove. */
const WAY_ASHORE_S = 1200;

/**
 * Finds the times on the water in a smoothed track. Cut off are drives, rests ashore, and the walks next to them. A track on which
 * nothing ever moves like a foil (a kayak, a yacht ghosting, a walk) keeps everything but drives and the rests at its ends: slow is
 * not ashore. When nothing at all is left, the whole track is one time on the water. Empty for a track of no samples.
 */
export function findOnWater(track: SmoothedTrack, noiseScaleM: number): OnWater {
  if (track.count === 0) return { sessions: [], drives: 0, foilLike: false };
  const motion = coarseMotion(track);
  const drives = findCar(motion);
  const land = new Uint8Array(motion.count);
  for (const drive of drives) land.fill(1, drive.from, drive.to + 1);
  for (const hole of runs(motion.count, (i) => (motion.gapS[i] as number) > HOLE_S))
    land.fill(1, hole.from, hole.to + 1);
  const foilLike = isFoilLike(motion, land);
  const rests = findRest(motion, noiseScaleM, land);
  const found = foilLike ? foilSessions(motion, land, { rests, drives }) : slowSessions(motion, land, rests);
  const time = (i: number) => track.startMs + Math.min(track.count - 1, i * motion.stride) * track.stepMs;
  const sessions = found.map((run) => ({ startMs: time(run.from), endMs: time(run.to) }));
  const whole = [{ startMs: track.startMs, endMs: time(motion.count - 1) }];
  return { sessions: sessions.length > 0 ? sessions : whole, drives: drives.length, foilLike };
}

function isFoilLike(motion: CoarseMotion, land: Uint8Array): boolean {
  const flies = (i: number) =>
    !land[i] && !(motion.gapS[i] as number) && (motion.mean6Mps[i] as number) > FOIL_MPS;
  let seconds = 0;
  let longestS = 0;
  for (const run of runs(motion.count, flies)) {
    const lengthS = (run.to - run.from) * motion.stepS;
    seconds += lengthS;
    longestS = Math.max(longestS, lengthS);
  }
  return seconds >= FOIL_S_MIN && longestS >= FLIGHT_S_MIN;
}

function foilSessions(
  motion: CoarseMotion,
  land: Uint8Array,
  found: { readonly rests: readonly Run[]; readonly drives: readonly Run[] },
): Run[] {
  const { count, stepS, mean6Mps } = motion;
  const drive = new Uint8Array(count);
  for (const run of found.drives) drive.fill(1, run.from, run.to + 1);
  const fast = runs(count, (i) => !drive[i] && (mean6Mps[i] as number) > 3);
  const firstFast = fast[0]?.from ?? count - 1;
  const lastFast = fast.at(-1)?.to ?? 0;
  for (const rest of found.rests) {
    const atEnd = rest.from * stepS < 60 || (count - rest.to) * stepS < 25;
    const byDrive = found.drives.length > 0 && (rest.to < firstFast || rest.from > lastFast);
    if ((rest.to - rest.from) * stepS > (atEnd || byDrive ? END_REST_S : BREAK_S))
      land.fill(1, rest.from, rest.to + 1);
  }
  const rides = (i: number) => (mean6Mps[i] as number) > RIDING_MPS;
  for (const run of runs(count, (i) => !land[i])) {
    const riding = runs(run.to - run.from + 1, (i) => rides(run.from + i)).some(
      (r) => (r.to - r.from) * stepS > RIDING_S,
    );
    const lengthS = (run.to - run.from) * stepS;
    const ashore = !riding && (lengthS < WAY_ASHORE_S || found.drives.length > 0);
    if (ashore || lengthS < RIDE_STRETCH_S_MIN) land.fill(1, run.from, run.to + 1);
  }
  return runs(count, (i) => !land[i])
    .map((run) => withoutWalks(motion, run, found.drives.length > 0))
    .filter((run) => (run.to - run.from) * stepS > SESSION_S_MIN);
}

function withoutWalks(motion: CoarseMotion, run: Run, afterDrive: boolean): Run {
  const rides = (i: number) => (motion.mean6Mps[i] as number) > RIDING_MPS;
  let firstRide = run.from;
  while (firstRide < run.to && !rides(firstRide)) firstRide++;
  let lastRide = run.to;
  while (lastRide > run.from && !rides(lastRide)) lastRide--;
  const samples = (seconds: number) => Math.round(seconds / motion.stepS);
  const inS =
    run.from > 0 ? walkLengthS(motion, { start: run.from, limit: firstRide, entry: true, afterDrive }) : 0;
  const outS =
    run.to < motion.count - 1
      ? walkLengthS(motion, { start: run.to, limit: lastRide, entry: false, afterDrive })
      : 0;
  return { from: run.from + samples(inS), to: run.to - samples(outS) };
}

function slowSessions(motion: CoarseMotion, land: Uint8Array, rests: readonly Run[]): Run[] {
  const { count, stepS } = motion;
  const free = runs(count, (i) => !land[i]);
  for (const rest of rests) {
    const atEnd = free.some((run) => (rest.from - run.from) * stepS < 20 || (run.to - rest.to) * stepS < 20);
    if (atEnd && (rest.to - rest.from) * stepS > SLOW_END_REST_S) land.fill(1, rest.from, rest.to + 1);
  }
  return runs(count, (i) => !land[i]).filter((run) => (run.to - run.from) * stepS > SESSION_S_MIN);
}
