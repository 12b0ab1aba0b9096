import { type Run, runs } from "@/lib/numeric/runs";

import type { CoarseMotion } from "./coarse-motion";
import { restSpeedMps } from "./stationary-gate";

/** Slower than this over four seconds belongs to the rest before or after it. */
const SETTLING_MPS = 0.45;
const JOIN_S = 15;
/** Up to here rests are one when they are at one place: a receiver may wander off and back. */
const JOIN_S_SAME_PLACE = 30;

/**
 * Stretches at rest outside `land`: net speed over half a minute no more than a resting receiver shows, grown to where the
 * movement begins and ends, neighbours within 15 s (half a minute at the same place) joined. Runs of coarse samples, in order.
 */
export function findRest(motion: CoarseMotion, noiseScaleM: number, land: Uint8Array): Run[] {
  const limit = restSpeedMps(noiseScaleM);
  const { net4Mps, net30Mps, count, stepS } = motion;
  const found: { from: number; to: number }[] = [];
  for (const run of runs(count, (i) => (net30Mps[i] as number) < limit && !land[i])) {
    let { from, to } = run;
    while (from > 0 && (net4Mps[from] as number) < SETTLING_MPS) from--;
    while (to < count - 1 && (net4Mps[to] as number) < SETTLING_MPS) to++;
    const last = found.at(-1);
    const apartS = last ? (from - last.to) * stepS : Infinity;
    const samePlace = last ? movedM(motion, last.to, from) < 4 + 2 * noiseScaleM : false;
    if (last && apartS < (samePlace ? JOIN_S_SAME_PLACE : JOIN_S)) last.to = Math.max(last.to, to);
    else found.push({ from, to });
  }
  return found;
}

function movedM(motion: CoarseMotion, from: number, to: number): number {
  const dx = (motion.xM[to] as number) - (motion.xM[from] as number);
  const dy = (motion.yM[to] as number) - (motion.yM[from] as number);
  return Math.sqrt(dx * dx + dy * dy);
}
