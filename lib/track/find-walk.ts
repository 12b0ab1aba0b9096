import { median } from "@/lib/numeric/quantile";

import { changeOfGait } from "./change-of-gait";
import type { CoarseMotion } from "./coarse-motion";

/** Longest walk between the resting place and the water that is looked for, seconds. */
const WALK_S_MAX = 340;
/** Most walks with a board take about this long; the spread is of the logarithm. */
const WALK_S_USUAL = 36;
const SURELY_RIDING_MPS = 2.7;
/** Weight of a second's likelihood: neighbouring samples say nearly the same. */
const EVIDENCE_PER_S = 0.15;
/** On the way out there is no dip to see: the change of gait says where, and evidence beyond this adds no more length. */
const EVIDENCE_MAX_OUT = 6;
const CHANGE_WEIGHT = 0.25;
/** Weight of the dip in speed when the board is put down. */
const DIP_WEIGHT = 2.2;
/** What a walk must beat: some start from a boat or step off the beach straight into the water, few end that way. */
const NO_WALK_IN_SCORE = 1;
const NO_WALK_OUT_SCORE = -1.5;

const normal = (v: number, mean: number, sd: number) =>
  Math.exp(-0.5 * ((v - mean) / sd) ** 2) / (sd * Math.sqrt(2 * Math.PI));

const clamp = (v: number, low: number, high: number) => Math.min(high, Math.max(low, v));

/** Where to look for the walk: from coarse sample `start` towards `limit`; `entry` on the way into the water. */
export type WalkSearch = {
  readonly start: number;
  readonly limit: number;
  readonly entry: boolean;
  readonly afterDrive: boolean;
};

/**
 * Length in seconds of the walk between a resting place on land and the water: the cumulated likelihood of steady walking (0.85 to 1.45
 * m/s) against paddling, floating and swimming, with what is usual for such walks, and, on the way in, the dip when the board is put
 * down, on the way out, the change of gait. 0 when walking explains nothing. Paddling out and walking overlap in speed: tens of seconds are inherent.
 * The speeds are from trials on modelled tracks, not from a publication.
 */
export function walkLengthS(motion: CoarseMotion, search: WalkSearch): number {
  const seTypical = median(motion.speedSeMps.filter((_, i) => i % 40 === 0));
  const seconds = Math.min(WALK_S_MAX, Math.floor(Math.abs(search.limit - search.start) * motion.stepS));
  const change = changeOfGait(motion, {
    start: search.start,
    direction: search.entry ? 1 : -1,
    seconds,
    limitMps: SURELY_RIDING_MPS,
    seMps: seTypical,
  });
  let best = { score: search.entry ? NO_WALK_IN_SCORE : NO_WALK_OUT_SCORE, lengthS: 0 };
  for (let pace = 0.85; pace < 1.46; pace += 0.06) {
    const found = bestAtPace(motion, search, { pace, seTypical, seconds, change });
    if (found.score > best.score) best = found;
  }
  return best.lengthS;
}

function bestAtPace(
  motion: CoarseMotion,
  search: WalkSearch,
  trial: {
    readonly pace: number;
    readonly seTypical: number;
    readonly seconds: number;
    readonly change: (second: number) => number;
  },
): { score: number; lengthS: number } {
  const blur = 0.6 * trial.seTypical;
  const walkSd = Math.hypot(0.07, blur);
  const floatSd = Math.hypot(0.25, blur);
  const logSpread = search.afterDrive ? 0.9 : 0.5;
  const direction = search.entry ? 1 : -1;
  let evidence = 0;
  let best = { score: -Infinity, lengthS: 0 };
  for (let s = 0; s < trial.seconds; s++) {
    const k = search.start + direction * Math.round(s / motion.stepS);
    const v = motion.speedMps[k] ?? NaN;
    if (!(v <= SURELY_RIDING_MPS) && s > 3) break;
    if (!((motion.gapS[k] ?? 0) > 0)) {
      const water = 0.5 * normal(v, 1.45, floatSd) + 0.4 * normal(v, 0.5, floatSd) + 0.02;
      evidence += clamp(Math.log(normal(v, trial.pace, walkSd) + 0.004) - Math.log(water), -3, 2);
    }
    if (s < 8) continue;
    const usual = -0.5 * (Math.log(s / WALK_S_USUAL) / logSpread) ** 2;
    const walked = EVIDENCE_PER_S * evidence;
    const score = search.entry
      ? walked + usual + (DIP_WEIGHT * dipAt(motion, k)) / (0.3 + trial.seTypical)
      : Math.min(EVIDENCE_MAX_OUT, walked) + usual + CHANGE_WEIGHT * trial.change(s);
    if (score > best.score) best = { score, lengthS: s };
  }
  return best;
}

/** How much slower the three seconds after sample `k` are than the six before. */
function dipAt(motion: CoarseMotion, k: number): number {
  const before = meanSpeed(motion, k - Math.round(6.4 / motion.stepS), k - Math.round(0.6 / motion.stepS));
  const after = meanSpeed(motion, k + Math.round(0.2 / motion.stepS), k + Math.round(3 / motion.stepS));
  return clamp(before - after, -0.3, 1);
}

function meanSpeed(motion: CoarseMotion, from: number, to: number): number {
  const a = clamp(from, 0, motion.count - 1);
  const b = clamp(to, a, motion.count - 1);
  let sum = 0;
  for (let i = a; i <= b; i++) sum += motion.speedMps[i] as number;
  return sum / (b - a + 1);
}
