import type { BumpRide, Turn } from "@/lib/analysis/analysis";
import { median } from "@/lib/numeric/quantile";
import type { Truth, TrueSurge } from "@/tests/support/sea/truth";

type Match = { readonly truth: number; readonly found: number; readonly apartMs: number };

/** One-to-one matches, the nearest in time first. */
function matchNearest(candidates: Match[]): Match[] {
  const truths = new Set<number>();
  const founds = new Set<number>();
  return [...candidates]
    .sort((a, b) => a.apartMs - b.apartMs)
    .filter((match) => {
      if (truths.has(match.truth) || founds.has(match.found)) return false;
      truths.add(match.truth);
      founds.add(match.found);
      return true;
    });
}

/** Peaks whose rise and fall are both at least this (m/s) are demanded; near a true peak of the smaller size a found one is not false. */
const DEMANDED_MPS = 1.2;
const TRUE_MPS = 0.5;
const NEAR_MS = 2000;

export function scoreSurges(rides: readonly BumpRide[], truth: readonly TrueSurge[]): Record<string, number> {
  const near = (surge: TrueSurge, ride: BumpRide) =>
    ride.peakMs >= surge.topFromMs - NEAR_MS && ride.peakMs <= surge.topToMs + NEAR_MS;
  const demanded = truth.filter((surge) => surge.sizeMps >= DEMANDED_MPS && !surge.open);
  const real = truth.filter((surge) => surge.sizeMps >= TRUE_MPS);
  if (demanded.length === 0) return {};
  const candidates: Match[] = [];
  demanded.forEach((surge, i) =>
    rides.forEach((ride, j) => {
      if (near(surge, ride))
        candidates.push({ truth: i, found: j, apartMs: Math.abs(ride.peakMs - surge.peakMs) });
    }),
  );
  const matches = matchNearest(candidates);
  const wrong = rides.filter((ride) => !real.some((surge) => near(surge, ride))).length;
  const hits = matches.length;
  return {
    surgeF1: (2 * hits) / (hits + wrong + demanded.length),
    surgeRecall: hits / demanded.length,
    surgePrecision: hits + wrong > 0 ? hits / (hits + wrong) : 1,
  };
}

const TURN_MS = 6000;

export function scoreTurns(turns: readonly Turn[], truth: Truth["turns"]): Record<string, number> {
  const candidates = (anyKind: boolean): Match[] => {
    const list: Match[] = [];
    truth.forEach((t, i) =>
      turns.forEach((r, j) => {
        const apartMs = Math.abs(t.timeMs - r.timeMs);
        if (apartMs <= TURN_MS && (anyKind || t.kind === r.kind)) list.push({ truth: i, found: j, apartMs });
      }),
    );
    return list;
  };
  const whole = truth.length + turns.length;
  if (whole === 0) return {};
  const any = matchNearest(candidates(true));
  const out: Record<string, number> = {
    turnF1: (2 * any.length) / whole,
    turnKindF1: (2 * matchNearest(candidates(false)).length) / whole,
  };
  if (any.length > 0) {
    out.turnKept =
      any.filter((m) => truth[m.truth]?.keptFoil === turns[m.found]?.keptFoil).length / any.length;
    out.turnS = median(any.map((m) => m.apartMs / 1000));
  }
  return out;
}
