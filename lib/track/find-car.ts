import { type Run, runs } from "@/lib/numeric/runs";

import type { CoarseMotion } from "./coarse-motion";

/** Faster than this for five seconds (24 kn) is worth a look ... */
const FAST_MPS = 12.3;
const FAST_S = 5;
/** ... and this for twenty seconds (31 kn) is no rider of these sports on any but a record course (common practice, no source). */
const ROAD_MPS = 16;
const ROAD_S = 20;
/** A drive begins and ends where the car stands. */
const STANDING_MPS = 0.6;
/** Stops at lights and junctions do not end a drive. */
const STOP_S = 240;

/**
 * The drives of a track: from standing to standing around a stretch faster than any foil. A stretch of 24 to 31 kn alone is a drive only at the
 * ends of the track, away from other fast riding; so a fast wing session keeps its runs. Runs of coarse samples, in order.
 */
export function findCar(motion: CoarseMotion): Run[] {
  const { net4Mps, stepS, count } = motion;
  const drives: { from: number; to: number; sure: boolean }[] = [];
  for (const fast of runs(count, (i) => (net4Mps[i] as number) > FAST_MPS)) {
    if ((fast.to - fast.from) * stepS <= FAST_S) continue;
    let { from, to } = fast;
    while (from > 0 && (net4Mps[from] as number) > STANDING_MPS) from--;
    while (to < count - 1 && (net4Mps[to] as number) > STANDING_MPS) to++;
    const road = runs(fast.to - fast.from + 1, (i) => (net4Mps[fast.from + i] as number) > ROAD_MPS);
    const sure = road.some((run) => (run.to - run.from) * stepS > ROAD_S);
    const last = drives.at(-1);
    if (last && (from - last.to) * stepS < STOP_S) {
      last.to = Math.max(last.to, to);
      last.sure ||= sure;
    } else {
      drives.push({ from, to, sure });
    }
  }
  const riding = ridingSpan(motion, drives);
  return drives.filter((d) => d.sure || d.to < riding.from || d.from > riding.to);
}

/** From the first to the last time that moves like riding outside the possible drives. */
function ridingSpan(motion: CoarseMotion, drives: readonly Run[]): Run {
  const inDrive = new Uint8Array(motion.count);
  for (const drive of drives) inDrive.fill(1, drive.from, drive.to + 1);
  const rides = runs(motion.count, (i) => !inDrive[i] && (motion.mean6Mps[i] as number) > 3).filter(
    (run) => (run.to - run.from) * motion.stepS > 10,
  );
  const first = rides[0];
  const last = rides.at(-1);
  return first && last ? { from: first.from, to: last.to } : { from: 0, to: motion.count };
}
