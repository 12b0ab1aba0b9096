import type { Run } from "@/lib/numeric/runs";
import { bentWayAt, type WayCurve } from "./way-curve";

/** A window of a way curve: its ends and its mean speed. */
export type Window = { readonly startMs: number; readonly endMs: number; readonly speedMps: number };

const between = (wayM: Float64Array, place: number): number => {
  const below = Math.floor(place);
  const low = wayM[below] ?? NaN;
  const share = place - below;
  return share === 0 ? low : low + share * ((wayM[below + 1] ?? NaN) - low);
};

const windowAt = (curve: WayCurve, from: number, to: number, wayM: number): Window => ({
  startMs: curve.startMs + from * curve.stepMs,
  endMs: curve.startMs + to * curve.stepMs,
  speedMps: (wayM * 1000) / ((to - from) * curve.stepMs),
});

/**
 * The fastest mean speed over a fixed time, exact over the straight pieces: the mean is itself straight in the
 * window's place between knots, so the best window begins or ends on one. Never spans two runs.
 *
 * In: the curve, the time (s, positive). Out: the window, or null when no run is long enough.
 */
export function fastestOverTime(curve: WayCurve, timeS: number): Window | null {
  const width = (timeS * 1000) / curve.stepMs;
  const whole = Number.isInteger(width);
  const { wayM } = curve;
  let best = -1;
  let bestFrom = 0;
  for (const run of curve.runs) {
    for (let i = run.from; i + width <= run.to; i++) {
      const end = whole ? (wayM[i + width] ?? NaN) : between(wayM, i + width);
      const way = end - (wayM[i] ?? NaN);
      if (way > best) {
        best = way;
        bestFrom = i;
      }
    }
    if (whole) continue;
    for (let i = Math.ceil(run.from + width); i <= run.to; i++) {
      const way = (curve.wayM[i] ?? NaN) - between(curve.wayM, i - width);
      if (way > best) {
        best = way;
        bestFrom = i - width;
      }
    }
  }
  return best < 0 ? null : windowAt(curve, bestFrom, bestFrom + width, best);
}

/** A window may be this much faster between the knots of a 1 Hz series than on them (m/s). */
const BETWEEN_KNOTS_MPS = 0.4;
/** Places tried between two knots: a quarter of a second apart at 1 Hz. */
const PLACES_MS = 250;

/**
 * Like `fastestOverTime` for a short window on coarse knots: the window may begin between them, every quarter of a
 * second, on a way that bends with the speed (see `bentWayAt`). The time is taken as a whole number of steps.
 */
export function fastestBetweenKnots(curve: WayCurve, timeS: number): Window | null {
  const onKnots = fastestOverTime(curve, timeS);
  const by = Math.round(curve.stepMs / PLACES_MS);
  if (!onKnots || by <= 1) return onKnots;
  const { wayM } = curve;
  const width = Math.round((timeS * 1000) / curve.stepMs);
  const least = (onKnots.speedMps - BETWEEN_KNOTS_MPS) * timeS;
  let best = -1;
  let bestFrom = 0;
  for (const run of curve.runs) {
    for (let i = run.from; i + width <= run.to; i++) {
      if ((wayM[i + width] ?? NaN) - (wayM[i] ?? NaN) < least) continue;
      for (let k = 1 - by; k < by; k++) {
        const from = i + k / by;
        if (from < run.from || from + width > run.to) continue;
        const way = bentWayAt(wayM, from + width, run) - bentWayAt(wayM, from, run);
        if (way > best) {
          best = way;
          bestFrom = from;
        }
      }
    }
  }
  return windowAt(curve, bestFrom, bestFrom + width, best);
}

type Place = { from: number; to: number };

/** The window that begins on knot `i`; its end is at `reach` or before. Betters `best`, in knots. */
function tryFrom(wayM: Float64Array, i: number, reach: number, best: Best): void {
  const target = (wayM[i] ?? NaN) + best.lengthM;
  let end = reach;
  while (end - 1 > i && (wayM[end - 1] ?? NaN) >= target) end--;
  const before = wayM[end - 1] ?? NaN;
  const to = end - 1 + (target - before) / ((wayM[end] ?? NaN) - before);
  if (to - i < best.to - best.from) {
    best.from = i;
    best.to = to;
  }
}

/** The window that ends on knot `j`; its beginning is at `back` or after. */
function tryTo(wayM: Float64Array, j: number, back: number, best: Best): void {
  const target = (wayM[j] ?? NaN) - best.lengthM;
  let start = back;
  while (start + 1 < j && (wayM[start + 1] ?? NaN) <= target) start++;
  const here = wayM[start] ?? NaN;
  const ahead = (wayM[start + 1] ?? NaN) - here;
  const from = ahead > 0 ? start + (target - here) / ahead : start;
  if (j - from < best.to - best.from) {
    best.from = from;
    best.to = j;
  }
}

type Best = Place & { readonly lengthM: number };

/**
 * Betters `best` by the windows of a run. Only where the length is covered within the best time so far is it worth
 * a closer look; the same pair of knots tells that of the window that begins on the first and of the one that
 * ends on the second.
 */
function tryRun(wayM: Float64Array, run: Run, best: Best): void {
  const { lengthM } = best;
  const reach = (): number => Math.ceil(best.to - best.from);
  const first = wayM[run.from] ?? NaN;
  for (let j = run.from + 1; j <= run.to && j - run.from < reach(); j++) {
    if ((wayM[j] ?? NaN) - first >= lengthM) tryTo(wayM, j, run.from, best);
  }
  let steps = reach();
  for (let i = run.from; i + steps <= run.to; i++) {
    if ((wayM[i + steps] ?? NaN) - (wayM[i] ?? NaN) < lengthM) continue;
    tryTo(wayM, i + steps, i, best);
    tryFrom(wayM, i, i + steps, best);
    steps = reach();
  }
  const last = wayM[run.to] ?? NaN;
  for (let i = run.to - 1; i >= run.from && run.to - i < reach() + 1; i--) {
    if (last - (wayM[i] ?? NaN) >= lengthM) tryFrom(wayM, i, run.to, best);
  }
}

/**
 * The fastest mean speed over a fixed distance, exact over the straight pieces. Never spans two runs.
 *
 * In: the curve, the length (m, positive). Out: the window, or null when no run is long enough.
 */
export function fastestOverDistance(curve: WayCurve, lengthM: number): Window | null {
  const best: Best = { from: 0, to: Infinity, lengthM };
  for (const run of curve.runs) {
    if ((curve.wayM[run.to] ?? NaN) - (curve.wayM[run.from] ?? NaN) < lengthM) continue;
    tryRun(curve.wayM, run, best);
  }
  return best.to < Infinity ? windowAt(curve, best.from, best.to, lengthM) : null;
}

/**
 * Mean speeds (m/s) of windows of a fixed time that do not overlap and are no slower than `leastMps`: the rivals for
 * a maximum, the fastest of every successive place for a window. In order of time; empty without room.
 */
export function rivalSpeeds(curve: WayCurve, timeS: number, leastMps: number): number[] {
  const width = Math.round((timeS * 1000) / curve.stepMs);
  const wayLeast = leastMps * timeS;
  const rivals: number[] = [];
  for (const run of curve.runs) {
    let best = -Infinity;
    let bestAt = -Infinity;
    for (let i = run.from; i + width <= run.to; i++) {
      const way = (curve.wayM[i + width] ?? NaN) - (curve.wayM[i] ?? NaN);
      if (best > -Infinity && i - bestAt >= width) {
        rivals.push(best / timeS);
        best = -Infinity;
      }
      if (way >= wayLeast && way > best) {
        best = way;
        bestAt = i;
      }
    }
    if (best > -Infinity) rivals.push(best / timeS);
  }
  return rivals;
}

/**
 * Up to `wanted` fastest windows of a fixed time that do not overlap: the fastest, then the fastest clear of it, and
 * so on. Windows begin on knots. In order of speed, fastest first; fewer when there is no room.
 */
export function fastestSeparate(curve: WayCurve, timeS: number, wanted: number): Window[] {
  const width = (timeS * 1000) / curve.stepMs;
  const first = curve.runs[0]?.from ?? 0;
  const last = curve.runs.at(-1)?.to ?? -1;
  const wayOf = new Float64Array(Math.max(0, last + 1 - first)).fill(-1);
  for (const run of curve.runs) {
    for (let i = run.from; i + width <= run.to; i++) {
      wayOf[i - first] = between(curve.wayM, i + width) - (curve.wayM[i] ?? NaN);
    }
  }
  const found: Window[] = [];
  while (found.length < wanted) {
    let best = 0;
    let place = -1;
    for (let i = 0; i < wayOf.length; i++) {
      const way = wayOf[i] ?? -1;
      if (way > best) {
        best = way;
        place = i;
      }
    }
    if (place < 0) break;
    found.push(windowAt(curve, place + first, place + first + width, best));
    wayOf.fill(-1, Math.max(0, Math.floor(place - width) + 1), Math.ceil(place + width));
  }
  return found;
}
