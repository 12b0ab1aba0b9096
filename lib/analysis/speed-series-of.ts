import { median } from "@/lib/numeric/quantile";
import {
  FLAG_DROPOUT,
  FLAG_GAP,
  FLAG_ON_FOIL,
  FLAG_ON_WATER,
  type SpeedSeries,
} from "@/lib/track/speed-series";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";

/** Slower than this there is no course worth showing (m/s). Common practice, no source. */
const COURSE_MPS_MIN = 0.5;

/** A speed is doubtful when its standard error is over this and over this many times the usual one (m/s). */
const DOUBTFUL_MPS = 0.35;
const DOUBTFUL_TIMES = 1.7;

/** Standard error (m/s) above which a speed gives no short best: the receiver was disturbed there. */
function doubtfulSeMps(track: SmoothedTrack, onFoil: ArrayLike<number>): number {
  const stride = Math.max(1, Math.floor(track.count / 20_000));
  const errors: number[] = [];
  for (let i = 0; i < track.count; i += stride) if (onFoil[i] === 1) errors.push(track.speedSeMps[i] ?? 0);
  return errors.length === 0 ? Infinity : Math.max(DOUBTFUL_MPS, DOUBTFUL_TIMES * median(errors));
}

/** How many fine samples make one sample of the series: a second, or the recording's own rate when faster. */
function decimation(track: SmoothedTrack, rateHz: number): number {
  const wantedMs = rateHz > 1.5 ? 1000 / rateHz : 1000;
  return Math.max(1, Math.round(wantedMs / track.stepMs));
}

/** The first fine sample on a whole step of the clock, so that a 1 Hz series stands on whole seconds. */
function alignedOffset(track: SmoothedTrack, every: number): number {
  const stepMs = every * track.stepMs;
  const late = ((track.startMs % stepMs) + stepMs) % stepMs;
  return late === 0 ? 0 : Math.round((stepMs - late) / track.stepMs);
}

/** What the series needs beside the smoothed track. */
export type SeriesSource = {
  readonly track: SmoothedTrack;
  /** Cumulated way of every fine sample (m). */
  readonly wayM: Float64Array;
  /** 1 for fine samples on foil. */
  readonly onFoil: ArrayLike<number>;
  readonly rateHz: number;
  /** Holes between fixes longer than this (s) are gaps: no best spans them. */
  readonly gapLimitS: number;
  /** Holes longer than this (s) are dropouts: no short best spans them. */
  readonly dropoutLimitS: number;
};

/**
 * The series that is stored, sent to the page and summarised: every n-th sample of the smoothed track. Values are
 * picked, not averaged, so that the cumulated way is exact at every sample.
 *
 * Speed and its standard error are those of the stiff smoother; the way is that of the loose one (see
 * `cumulatedWayM`). A gap flag covers the fine samples that a picked sample stands for.
 */
export function speedSeriesOf(source: SeriesSource): SpeedSeries {
  const { track, wayM, onFoil, gapLimitS, dropoutLimitS } = source;
  const every = decimation(track, source.rateHz);
  const offset = alignedOffset(track, every);
  const count = Math.max(0, Math.ceil((track.count - offset) / every));
  const pick = (column: ArrayLike<number>) => (_: unknown, i: number) => column[offset + i * every] ?? 0;
  const shape = { length: count };
  const heart = track.heartRateBpm;
  const doubtful = doubtfulSeMps(track, onFoil);
  const flags = new Uint8Array(count);
  const courseDeg = new Float32Array(count);
  for (let i = 0; i < count; i++) {
    const fine = offset + i * every;
    const vx = track.vxMps[fine] ?? 0;
    const vy = track.vyMps[fine] ?? 0;
    const course = (Math.atan2(vx, vy) * 180) / Math.PI;
    courseDeg[i] = Math.hypot(vx, vy) < COURSE_MPS_MIN ? NaN : (course + 360) % 360;
    let holeS = 0;
    for (let k = fine; k < Math.min(track.count, fine + every); k++) {
      holeS = Math.max(holeS, track.gapS[k] ?? 0);
    }
    const unsure = holeS > dropoutLimitS || (track.speedSeMps[fine] ?? 0) > doubtful;
    const hole = holeS > gapLimitS ? FLAG_GAP : unsure ? FLAG_DROPOUT : 0;
    const water = track.onWater[fine] === 1 ? FLAG_ON_WATER : 0;
    flags[i] = hole | water | (onFoil[fine] === 1 ? FLAG_ON_FOIL : 0);
  }
  return {
    startMs: track.startMs + offset * track.stepMs,
    stepMs: track.stepMs * every,
    count,
    latDeg: Float64Array.from(shape, pick(track.latDeg)),
    lonDeg: Float64Array.from(shape, pick(track.lonDeg)),
    speedMps: Float32Array.from(shape, pick(track.speedMps)),
    speedSeMps: Float32Array.from(shape, pick(track.speedSeMps)),
    courseDeg,
    distanceM: Float64Array.from(shape, pick(wayM)),
    heartRateBpm: heart ? Float32Array.from(shape, pick(heart)) : null,
    flags,
  };
}
