import { chainedPlane } from "@/lib/geo/chained-plane";

import {
  bridgeHoles,
  eachSample,
  type FineColumns,
  PlaceNearFix,
  planeClock,
  type PlaneClock,
  type RunEnds,
} from "./fill-columns";
import { burstVarianceM2 } from "./find-bursts";
import { findRuns } from "./find-runs";
import type { Fixes } from "./fixes";
import { heartRateOnClock } from "./heart-rate-on-clock";
import type { TimedPlane } from "./local-velocity";
import { noiseScaleM } from "./noise-scale";
import { type FirstPass, hasReceiverSpeed, receiverVelocity } from "./receiver-speed";
import { roundingVarianceM2 } from "./rounding-variance";
import { type FixRun, type MeasuredVelocity, smoothInChunks } from "./smooth-in-chunks";
import { type Agility, LOOSE, type SmootherSettings, STIFF } from "./smoother-settings";
import type { SmoothedTrack } from "./smoothed-track";
import { gateStationary } from "./stationary-gate";
import { uniformClock } from "./uniform-clock";
import { splitWhite } from "./white-noise";

/** Holes shorter than this are usual dropped seconds and not marked. */
const MARKED_HOLE_S = 3;
/** A sample this near to a fix is not in the hole. */
const NEAR_FIX_S = 0.3;
/** Below this speed the noise term of a mean speed is no longer a small correction. */
const NOISE_TERM_MPS = 2;
/** Between distant fixes the model allows more weaving than anybody does; no more than this (m2/s2) is believed. */
const NOISE_TERM_VARIANCE_MAX = 0.14;
/** A receiver's own speed is not shortened by smoothing: only the rest of the term counts with it. Trials, no source. */
const NOISE_TERM_SHARE_WITH_SPEED = 0.4;

/** A smoothed track, not yet told from the land, with what the smoothing found out about the receiver. */
export type Smoothing = {
  readonly smoothed: SmoothedTrack;
  readonly noiseScaleM: number;
  readonly receiverSpeed: "used" | "absent" | "sparse" | "disagrees";
};

type Work = {
  readonly fixes: Fixes;
  readonly path: TimedPlane;
  readonly runs: readonly FixRun[];
  readonly scale: number;
  readonly extraWhiteM2: number;
  readonly doubtM2: Float64Array | null;
  readonly velocity: MeasuredVelocity | null;
};

/**
 * Smooths cleaned fixes onto the fine uniform clock: noise scale from the track, the receiver's own speed as a second measurement where it
 * is there and believable, a stiff pass for states and a loose one for lengths, straight ways across long holes, and a gate that
 * holds the speed at zero at rest. `onWater` is 1 everywhere. Fewer than two fixes give a track of no samples.
 *
 * `medianStepS` is the usual time between fixes. Sources: see `TwoAxisSmoother` and `singerTerms`.
 */
export function smoothTrack(fixes: Fixes, medianStepS: number): Smoothing {
  const firstMs = fixes.timeMs[0] ?? NaN;
  const plane = chainedPlane(fixes.latDeg, fixes.lonDeg, fixes.count);
  const path = {
    ...plane,
    count: fixes.count,
    timeS: Float64Array.from(fixes.timeMs, (t) => (t - firstMs) / 1000),
  };
  const roundingM2 = roundingVarianceM2(fixes);
  const noise = splitWhite(path, medianStepS, noiseScaleM(path, medianStepS, roundingM2));
  // Rounding is part of what is found white.
  const extraWhiteM2 = Math.max(noise.whiteM2, roundingM2);
  const bare: Work = {
    fixes,
    path,
    runs: findRuns(path, medianStepS),
    scale: noise.scaleM,
    extraWhiteM2,
    doubtM2: burstVarianceM2(path, medianStepS),
    velocity: null,
  };
  const scale = Math.hypot(noise.scaleM, Math.sqrt(noise.whiteM2));
  const receiver = measuredVelocity(bare);
  const work = { ...bare, velocity: receiver.velocity };
  const clock = uniformClock(firstMs, fixes.timeMs[fixes.count - 1] ?? NaN, medianStepS);
  const onPlane = planeClock(clock, firstMs);
  const columns = emptyColumns(clock.count);
  const ends = stiffPass(work, columns, onPlane);
  loosePass(work, columns, onPlane);
  bridgeHoles(columns, onPlane, { ...work, ends });
  gateStationary(columns, onPlane.stepS, scale);
  const smoothed: SmoothedTrack = {
    ...clock,
    ...columns,
    gapS: holes(path, onPlane),
    onWater: new Uint8Array(clock.count).fill(1),
    heartRateBpm: heartRateOnClock(fixes, clock),
  };
  return { smoothed, noiseScaleM: scale, receiverSpeed: receiver.state };
}

function settings(work: Work, agility: Agility): SmootherSettings {
  return { agility, noiseScaleM: work.scale, extraWhiteM2: work.extraWhiteM2 };
}

function emptyColumns(count: number): FineColumns {
  const make = () => new Float64Array(count);
  return {
    latDeg: make(),
    lonDeg: make(),
    xM: make(),
    yM: make(),
    vxMps: make(),
    vyMps: make(),
    speedMps: make(),
    speedSeMps: make(),
    speedMpsLoose: make(),
  };
}

function measuredVelocity(work: Work): {
  velocity: MeasuredVelocity | null;
  state: Smoothing["receiverSpeed"];
} {
  const said = work.fixes.receiverSpeedMps;
  if (!hasReceiverSpeed(said)) return { velocity: null, state: "absent" };
  const make = () => new Float64Array(work.path.count).fill(NaN);
  const first: FirstPass = { vxMps: make(), vyMps: make(), alongMps2: make(), seMps: make() };
  // A stiff course would hold the velocities to a line that cuts the corners of the way: 0.1 to 0.3 % short on waves.
  smoothInChunks(work, settings(work, LOOSE), (chunk) => {
    const s = chunk.states;
    for (let i = 0; i < chunk.count; i++) {
      const fix = chunk.fixOf[i] as number;
      if (fix < 0) continue;
      const vx = s.vxMps[i] as number;
      const vy = s.vyMps[i] as number;
      const along = vx * (s.axMps2[i] as number) + vy * (s.ayMps2[i] as number);
      first.vxMps[fix] = vx;
      first.vyMps[fix] = vy;
      first.alongMps2[fix] = along / Math.max(0.3, Math.sqrt(vx * vx + vy * vy));
      first.seMps[fix] = Math.sqrt(s.velocityVariance[i] as number);
    }
  });
  const verdict = receiverVelocity(said, first, work.scale);
  return verdict.used
    ? { velocity: verdict.velocity, state: "used" }
    : { velocity: null, state: verdict.reason };
}

function stiffPass(work: Work, columns: FineColumns, clock: PlaneClock): RunEnds {
  const { path, runs } = work;
  const fixAt = (pick: (run: FixRun) => number, axis: Float64Array) =>
    Float64Array.from(runs, (run) => axis[pick(run)] as number);
  const ends: RunEnds = {
    startX: fixAt((run) => run.from, path.xM),
    startY: fixAt((run) => run.from, path.yM),
    endX: fixAt((run) => run.to, path.xM),
    endY: fixAt((run) => run.to, path.yM),
  };
  const place = new PlaceNearFix(work.fixes, path);
  let next = 0;
  let run = 0;
  smoothInChunks(work, settings(work, STIFF), (chunk) => {
    const s = chunk.states;
    const lastNode = chunk.count - 1;
    while ((runs[run]?.to ?? Infinity) < (chunk.fixOf[lastNode] as number)) run++;
    if (chunk.fixOf[0] === runs[run]?.from) {
      ends.startX[run] = s.xM[0] as number;
      ends.startY[run] = s.yM[0] as number;
    }
    if (chunk.fixOf[lastNode] === runs[run]?.to) {
      ends.endX[run] = s.xM[lastNode] as number;
      ends.endY[run] = s.yM[lastNode] as number;
    }
    let fix = chunk.fixOf[0] as number;
    let seen = 0;
    next = eachSample(chunk, clock, next, (k, path_, i, share) => {
      for (; seen <= i; seen++) if ((chunk.fixOf[seen] as number) >= 0) fix = chunk.fixOf[seen] as number;
      place.take(fix);
      place.write(columns, k, path_.x, path_.y);
      columns.xM[k] = path_.x;
      columns.yM[k] = path_.y;
      columns.vxMps[k] = path_.vx;
      columns.vyMps[k] = path_.vy;
      columns.speedMps[k] = Math.sqrt(path_.vx * path_.vx + path_.vy * path_.vy);
      columns.speedSeMps[k] = Math.sqrt(between(s.velocityVariance, i, share));
    });
  });
  return ends;
}

function loosePass(work: Work, columns: FineColumns, clock: PlaneClock): void {
  const termShare = work.velocity ? NOISE_TERM_SHARE_WITH_SPEED : 1;
  let next = 0;
  smoothInChunks(work, settings(work, LOOSE), (chunk) => {
    next = eachSample(chunk, clock, next, (k, path, i, share) => {
      const v = Math.sqrt(path.vx * path.vx + path.vy * path.vy);
      const variance = Math.min(
        NOISE_TERM_VARIANCE_MAX,
        termShare * between(chunk.states.velocityVariance, i, share),
      );
      // A smoothed velocity is a mean over what noise hides; the mean of a speed exceeds the speed of a mean by this.
      columns.speedMpsLoose[k] = v > NOISE_TERM_MPS ? v + variance / (2 * v) : v;
    });
  });
}

function between(column: Float64Array, i: number, share: number): number {
  const a = column[i] as number;
  return a + share * ((column[i + 1] as number) - a);
}

function holes(path: TimedPlane, clock: PlaneClock): Float32Array {
  const gapS = new Float32Array(clock.count);
  for (let i = 1; i < path.count; i++) {
    const t0 = path.timeS[i - 1] as number;
    const t1 = path.timeS[i] as number;
    if (t1 - t0 <= MARKED_HOLE_S) continue;
    const from = Math.max(0, Math.ceil((t0 + NEAR_FIX_S - clock.startS) / clock.stepS));
    const to = Math.min(clock.count, Math.ceil((t1 - NEAR_FIX_S - clock.startS) / clock.stepS));
    if (to > from) gapS.fill(t1 - t0, from, to);
  }
  return gapS;
}
