import type { Run } from "@/lib/numeric/runs";
import { FLAG_GAP, FLAG_ON_WATER, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";

/**
 * Way over time as straight pieces between knots: knot `i` is at `startMs + i * stepMs` and `wayM[i]` metres.
 * Only inside `runs` (knot indices, both ends inclusive) is the curve known without a hole and on the water.
 */
export type WayCurve = {
  readonly startMs: number;
  readonly stepMs: number;
  readonly wayM: Float64Array;
  readonly runs: readonly Run[];
};

/** Samples first ... last of a series, the flags that end a run, and the longest hole (samples) passed over. */
type Usable = {
  readonly first: number;
  readonly last: number;
  readonly breaks: number;
  readonly bridged: number;
};

/** Runs of samples on the water without any of the breaks but short holes between usable ones. */
function usableRuns(flags: Uint8Array, { first, last, breaks, bridged }: Usable): Run[] {
  const found: Run[] = [];
  let from = -1;
  for (let i = first; i <= last + 1; i++) {
    const usable = i <= last && ((flags[i] ?? 0) & (breaks | FLAG_ON_WATER)) === FLAG_ON_WATER;
    if (usable && from < 0) from = i;
    else if (!usable && from >= 0) {
      found.push({ from, to: i - 1 });
      from = -1;
    }
  }
  return bridged > 0 ? joinAcrossHoles(found, flags, bridged) : found;
}

function joinAcrossHoles(runs: readonly Run[], flags: Uint8Array, bridged: number): Run[] {
  const joined: Run[] = [];
  for (const run of runs) {
    const last = joined.at(-1);
    const hole = last ? flags.subarray(last.to + 1, run.from) : null;
    if (last && hole && hole.length <= bridged && hole.every((f) => (f & FLAG_ON_WATER) !== 0))
      joined[joined.length - 1] = { from: last.from, to: run.to };
    else joined.push(run);
  }
  return joined;
}

/**
 * The curve of a series inside a stretch, knots at its samples: times on the water without a gap (`breaks`:
 * the flags that end a run), but for holes of at most `bridgedS` seconds. The ends of the stretch are taken inwards
 * to whole samples.
 */
export function wayCurveOf(
  series: SpeedSeries,
  stretch: Stretch,
  options: { readonly breaks?: number; readonly bridgedS?: number } = {},
): WayCurve {
  const first = Math.max(0, Math.ceil((stretch.startMs - series.startMs) / series.stepMs));
  const last = Math.min(series.count - 1, Math.floor((stretch.endMs - series.startMs) / series.stepMs));
  const { breaks = FLAG_GAP, bridgedS = 0 } = options;
  const bridged = Math.floor((bridgedS * 1000) / series.stepMs);
  const runs = usableRuns(series.flags, { first, last, breaks, bridged });
  return { startMs: series.startMs, stepMs: series.stepMs, wayM: series.distanceM, runs };
}

/**
 * The bend that two neighbouring second differences agree on: their mean, at most twice the smaller; none when of
 * different sign. Source: the limiter of van Leer 1977, J. Comput. Phys. 23.
 */
function agreedBend(one: number, other: number): number {
  if (one > 0 && other > 0) return Math.min((one + other) / 2, 2 * one, 2 * other);
  return one < 0 && other < 0 ? Math.max((one + other) / 2, 2 * one, 2 * other) : 0;
}

/**
 * The way at a fractional knot of a run, m. Between two knots it bends as much as the second differences at both
 * agree on (none at a corner, so that a speed constant in pieces stays so; none next to the ends of the run).
 */
export function bentWayAt(wayM: Float64Array, place: number, run: Run): number {
  const i = Math.floor(place);
  const u = place - i;
  const b = wayM[i] ?? NaN;
  if (u === 0) return b;
  const c = wayM[i + 1] ?? NaN;
  const straight = b + u * (c - b);
  if (i <= run.from || i + 2 > run.to) return straight;
  const bend = agreedBend((wayM[i - 1] ?? NaN) - 2 * b + c, b - 2 * c + (wayM[i + 2] ?? NaN));
  return straight - ((u * (1 - u)) / 2) * bend;
}

/**
 * The same curve with the way worked out again from the speed of the series (the stiff smoother's), by the trapezoid
 * rule and a correction for the bend of speed that both ends agree on. The loose smoother that the way comes from
 * is right in length but too lively over a second or two, which a maximum would pick out.
 *
 * Source: the trapezoid rule's error term, -h^3 f'' / 12 (Abramowitz and Stegun 1964, 25.4.1).
 */
export function withWayFromSpeed(curve: WayCurve, series: SpeedSeries): WayCurve {
  const { speedMps } = series;
  const stepS = curve.stepMs / 1000;
  const wayM = new Float64Array(series.count);
  for (const run of curve.runs) {
    let b = speedMps[run.from] ?? 0;
    let c = speedMps[run.from + 1] ?? b;
    let bendBefore = 0;
    for (let i = run.from; i < run.to; i++) {
      const d = i + 1 < run.to ? (speedMps[i + 2] ?? 0) : 2 * c - b;
      const bendAfter = b - 2 * c + d;
      const mean = (b + c) / 2 - agreedBend(bendBefore, bendAfter) / 12;
      wayM[i + 1] = (wayM[i] ?? 0) + stepS * Math.max(0, mean);
      b = c;
      c = d;
      bendBefore = bendAfter;
    }
  }
  return { ...curve, wayM };
}
