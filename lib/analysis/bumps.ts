import { at } from "@/lib/errors/invariant";
import { median } from "@/lib/numeric/quantile";
import { turningPoints, type TurningPoint } from "@/lib/numeric/turning-points";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { BumpRide, Discipline, Lull } from "./analysis";
import type { FoilSpan } from "./on-foil";
import { valueAt } from "./value-at";

/** A swing of speed smaller than this is not a bump (m/s), nor one within three of its standard errors. */
export const SWING_MPS_MIN = 0.5;
/** A swing is the difference of two speeds: its standard error is theirs times the root of 2. */
export const SWING_STANDARD_ERRORS = 3 * Math.SQRT2;
/** A swing that every rider feels counts on the poorest receiver too (m/s). Trials, no published source. */
export const SWING_MPS_MAX = 1;
/**
 * Under a hand wing the push is steady and real surges are few, so that the same noise makes more of the swings: more standard errors and a
 * higher ceiling are asked. Trials on modelled sessions, no published source.
 */
const WING_TIMES = 1.3;
const WING_MPS_MAX = 1.4;
/** Standard gravity, exact by definition (m/s2). Source: CGPM 1901, resolution 2. */
export const STANDARD_GRAVITY_MPS2 = 9.80665;
/**
 * Shares of the height left out at the ends of a lull: near a peak the bump still pushes, near the lowest speed the
 * next one begins to. Trials on modelled coast-downs, no published source.
 */
const TOP_SHARE = 0.08;
const BOTTOM_SHARE = 0.04;
/**
 * The glide ratio falls with speed, so lulls are compared over speeds that sessions share: what is above this
 * (m/s, 17.5 kn) is left out. Our choice, no source.
 */
const LULL_MPS_MAX = 9;

export type BumpsAndLulls = { readonly bumpRides: BumpRide[]; readonly lulls: Lull[] };

/**
 * Energy height of a speed, metres: v^2 / (2 g), how high the speed would throw a body up.
 *
 * @example
 * energyHeightM(9.80665); // 4.903325
 */
export function energyHeightM(speedMps: number): number {
  return speedMps ** 2 / (2 * STANDARD_GRAVITY_MPS2);
}

/** The swing that counts, from the median standard error on foil. */
function swingOf(track: SmoothedTrack, spans: readonly FoilSpan[], discipline: Discipline): number {
  const errors: number[] = [];
  const stride = Math.max(1, Math.round(2000 / track.stepMs));
  for (const span of spans) {
    for (let i = Math.ceil(span.start); i <= span.end; i += stride) errors.push(track.speedSeMps[i] ?? 0);
  }
  const error = errors.length > 0 ? median(errors) : 0;
  const wing = discipline === "wing";
  const asked = SWING_STANDARD_ERRORS * error * (wing ? WING_TIMES : 1);
  return Math.min(wing ? WING_MPS_MAX : SWING_MPS_MAX, Math.max(SWING_MPS_MIN, asked));
}

/** Fractional index, walking from one sample to another, at which the column first passes the level. */
function passing(column: ArrayLike<number>, from: number, to: number, level: number): number {
  const way = Math.sign(to - from);
  const above = (column[from] ?? 0) > level;
  for (let i = from; i !== to; i += way) {
    const here = column[i] ?? 0;
    const next = column[i + way] ?? 0;
    if (next > level !== above) return next === here ? i + way : i + (way * (level - here)) / (next - here);
  }
  return to;
}

type Context = { readonly track: SmoothedTrack; readonly wayM: Float64Array };

const timeAt = (track: SmoothedTrack, index: number): number => track.startMs + index * track.stepMs;

function rideOf(context: Context, before: number, peak: number, after: number): BumpRide {
  const { track, wayM } = context;
  const speed = track.speedMps;
  const top = speed[peak] ?? 0;
  const start = passing(speed, peak, before, (top + (speed[before] ?? 0)) / 2);
  const end = passing(speed, peak, after, (top + (speed[after] ?? 0)) / 2);
  return {
    startMs: timeAt(track, start),
    endMs: timeAt(track, end),
    peakMs: timeAt(track, peak),
    speedMpsPeak: top,
    gainMps: top - (speed[before] ?? 0),
    distanceM: valueAt(wayM, end) - valueAt(wayM, start),
  };
}

function lullOf(context: Context, peak: number, low: number, keptFoil: boolean): Lull | null {
  const { track, wayM } = context;
  const speed = track.speedMpsLoose;
  const top = energyHeightM(speed[peak] ?? 0);
  const bottom = energyHeightM(speed[low] ?? 0);
  if (!(top > bottom)) return null;
  const speedOf = (height: number): number => Math.sqrt(2 * STANDARD_GRAVITY_MPS2 * height);
  const upper = Math.min(LULL_MPS_MAX, speedOf(top - TOP_SHARE * (top - bottom)));
  const lower = speedOf(bottom + BOTTOM_SHARE * (top - bottom));
  if (!(upper > lower)) return null;
  const start = passing(speed, low, peak, upper);
  const end = passing(speed, peak, low, lower);
  if (!(end > start)) return null;
  return {
    startMs: timeAt(track, start),
    endMs: timeAt(track, end),
    distanceM: valueAt(wayM, end) - valueAt(wayM, start),
    heightLostM: energyHeightM(valueAt(speed, start)) - energyHeightM(valueAt(speed, end)),
    keptFoil,
  };
}

/** Bump rides and lulls of one time on foil. */
function bumpsOfSpan(context: Context, span: FoilSpan, swing: number): BumpsAndLulls {
  const range = { from: Math.ceil(span.start), to: Math.floor(span.end) };
  const points = turningPoints(context.track.speedMps, swing, range);
  const touchdownFrom = range.to - 2000 / context.track.stepMs;
  const bumpRides: BumpRide[] = [];
  const lulls: Lull[] = [];
  points.forEach((point: TurningPoint, k: number) => {
    if (point.kind !== "peak" || k + 1 >= points.length) return;
    const after = at(points, k + 1).index;
    const before = k > 0 ? at(points, k - 1).index : range.from;
    if (before < point.index) bumpRides.push(rideOf(context, before, point.index, after));
    const lull = lullOf(context, point.index, after, after < touchdownFrom);
    if (lull) lulls.push(lull);
  });
  return { bumpRides, lulls };
}

/**
 * Bump rides and lulls on foil, from the turning points of smoothed speed by a zig-zag with a swing of at least
 * max(0.5 m/s, 3 standard errors of a difference), never more than 1 m/s; for a wing 4 standard errors and 1.4 m/s.
 *
 * A bump ride runs from the up-crossing to the down-crossing of the middle between a peak and its neighbouring
 * lulls; its gain is lull to peak. A peak that the touchdown cuts off before the speed has fallen by a swing is left
 * out. A lull is the fall from a peak to the next lowest speed, without 8 % of its energy height at the top and 4 % at
 * the bottom, below 9 m/s; it kept the foil when no touchdown follows within 2 s of its lowest speed. In: the track, spans on foil, the cumulated way, the discipline.
 * Out: both in order of time; times in UTC ms.
 */
export function findBumps(
  track: SmoothedTrack,
  spans: readonly FoilSpan[],
  wayM: Float64Array,
  discipline: Discipline = "downwind",
): BumpsAndLulls {
  const swing = swingOf(track, spans, discipline);
  const parts = spans.map((span) => bumpsOfSpan({ track, wayM }, span, swing));
  return {
    bumpRides: parts.flatMap((part) => part.bumpRides),
    lulls: parts.flatMap((part) => part.lulls),
  };
}
