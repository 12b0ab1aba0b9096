import type { Analysis, BestKey } from "@/lib/analysis/analysis";
import { median, quantile } from "@/lib/numeric/quantile";
import type { Stretch } from "@/lib/track/speed-series";
import type { Truth } from "@/tests/support/sea/truth";

import { scoreSurges, scoreTurns } from "./score-moments";

/** Figures of one analysed session against its truth; a figure that does not apply is missing. Signed errors are result less truth. */
export type Score = {
  readonly values: Readonly<Record<string, number>>;
  /** Errors in units of their stated standard error. */
  readonly inSe: Readonly<Record<string, number>>;
};

export type ScoredSession = {
  readonly analysis: Analysis;
  readonly truth: Truth;
  readonly dropouts: readonly Stretch[];
  /** What the kind of session has: turns of a wing; bests over distances not of short coast-downs. */
  readonly scores: { readonly turns: boolean; readonly wind: boolean; readonly longBests: boolean };
};

const percent = (result: number, truth: number): number => (100 * (result - truth)) / truth;

export function scoreSession(session: ScoredSession): Score {
  const { analysis, truth } = session;
  const { figures } = analysis;
  const values: Record<string, number> = { ...flightScores(session) };
  const inSe: Record<string, number> = {};
  const state = (name: string, error: number, se: number) => {
    if (se > 0 && Number.isFinite(error)) inSe[name] = error / se;
  };
  values.waterDistPct = percent(figures.waterDistanceM, truth.waterDistanceM);
  values.foilDistPct = percent(figures.onFoilDistanceM, truth.onFoilDistanceM);
  values.foilTimePct = percent(figures.onFoilTimeS, truth.onFoilTimeS);
  state("waterDist", figures.waterDistanceM - truth.waterDistanceM, figures.waterDistanceSeM);
  for (const key of ["s2", "s10", "m500", "nm"] as const satisfies readonly BestKey[]) {
    const wanted = truth.bests[key];
    const best = figures.bests[key];
    if (wanted === null || "withheld" in best) continue;
    if (!session.scores.longBests && (key === "m500" || key === "nm")) continue;
    values[`${key}Pct`] = percent(best.speedMps, wanted);
    state(key, best.speedMps - wanted, best.seMps);
  }
  values.waterIoU = overlap(analysis.waterSessions, truth.waterSessions);
  Object.assign(values, scoreSurges(analysis.bumpRides, truth.surges));
  if (session.scores.turns) Object.assign(values, scoreTurns(analysis.turns, truth.turns));
  if (session.scores.wind) {
    const off = ((analysis.windFromDeg ?? truth.windFromDeg + 180) - truth.windFromDeg + 540) % 360;
    values.windDeg = Math.abs(((off + 360) % 360) - 180);
  }
  return { values, inSe };
}

/** Time that both lists share over the time that either covers. Lists in order, not overlapping. */
export function overlap(one: readonly Stretch[], other: readonly Stretch[]): number {
  const length = (list: readonly Stretch[]) => list.reduce((sum, s) => sum + s.endMs - s.startMs, 0);
  let shared = 0;
  for (const a of one)
    for (const b of other) shared += Math.max(0, Math.min(a.endMs, b.endMs) - Math.max(a.startMs, b.startMs));
  const either = length(one) + length(other) - shared;
  return either > 0 ? shared / either : 1;
}

type Pair = { readonly truth: number; readonly found: number; readonly share: number };

/** One-to-one pairs of flights that overlap by half or more, the best first. */
function pairFlights(truth: readonly Stretch[], found: readonly Stretch[]): Pair[] {
  const pairs: Pair[] = [];
  truth.forEach((t, i) =>
    found.forEach((f, j) => {
      const share = overlap([t], [f]);
      if (share >= 0.5) pairs.push({ truth: i, found: j, share });
    }),
  );
  pairs.sort((a, b) => b.share - a.share);
  const usedTruth = new Set<number>();
  const usedFound = new Set<number>();
  return pairs.filter((pair) => {
    if (usedTruth.has(pair.truth) || usedFound.has(pair.found)) return false;
    usedTruth.add(pair.truth);
    usedFound.add(pair.found);
    return true;
  });
}

function flightScores({ analysis, truth, dropouts }: ScoredSession): Record<string, number> {
  const found = analysis.segments;
  const pairs = pairFlights(truth.flights, found);
  const demanded = truth.flights.filter((f) => !f.short).length;
  const isShort = (pair: Pair) => truth.flights[pair.truth]?.short === true;
  const hits = pairs.filter((pair) => !isShort(pair)).length;
  const paired = new Set(pairs.map((pair) => pair.found));
  const excused = found.filter(
    (f, j) =>
      !paired.has(j) &&
      truth.flights.some(
        (t) =>
          t.short &&
          Math.min(t.endMs, f.endMs) - Math.max(t.startMs, f.startMs) > 0.5 * (f.endMs - f.startMs),
      ),
  ).length;
  const wrong = found.length - pairs.length - excused;
  const hidden = (ms: number) => dropouts.some((d) => ms >= d.startMs - 500 && ms <= d.endMs + 1500);
  const takeoffs: number[] = [];
  const touchdowns: number[] = [];
  for (const pair of pairs.filter((p) => !isShort(p))) {
    const t = truth.flights[pair.truth];
    const f = found[pair.found];
    if (!t || !f) continue;
    if (!hidden(t.startMs)) takeoffs.push((f.startMs - t.startMs) / 1000);
    if (!hidden(t.endMs) && t.endedBy !== "landing") touchdowns.push((f.endMs - t.endMs) / 1000);
  }
  const out: Record<string, number> = { flightF1: (2 * hits) / (hits + wrong + demanded) };
  const edges = (name: string, errors: readonly number[]) => {
    if (errors.length === 0) return;
    const sizes = errors.map(Math.abs);
    out[`${name}S`] = median(sizes);
    out[`${name}P90S`] = quantile(sizes, 0.9);
    out[`${name}BiasS`] = median(errors);
  };
  edges("takeoff", takeoffs);
  edges("touchdown", touchdowns);
  return out;
}
