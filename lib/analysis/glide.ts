import { quantile } from "@/lib/numeric/quantile";
import type { Rng } from "@/lib/numeric/rng";
import type { GlideFigures, Lull } from "./analysis";

/** Fewer lulls say nothing worth an interval. Common practice, no source. */
export const LULLS_MIN = 5;
const RESAMPLES = 400;

/**
 * Glide ratio: metres of way per metre of energy height lost, pooled over lulls (sum of distance by sum of
 * height lost), with a percentile bootstrap interval (95 %) over lulls.
 *
 * On flat water without push it is the lift-to-drag ratio with the rider's air drag in it; behind a bump or with
 * wind it is an apparent value. In: lulls of the stretch; the generator for resampling, so that the same lulls
 * give the same interval. Out: null below 5 lulls or when no height was lost.
 *
 * Source: energy height, Lush 1940 (as in flight mechanics texts); bootstrap: Efron and Tibshirani 1993, ch. 13.
 */
export function glideFigures(lulls: readonly Lull[], rng: Rng): GlideFigures | null {
  const n = lulls.length;
  if (n < LULLS_MIN) return null;
  const distance = Float64Array.from(lulls, (lull) => lull.distanceM);
  const height = Float64Array.from(lulls, (lull) => lull.heightLostM);
  const pooled = (pick: (k: number) => number): number => {
    let way = 0;
    let lost = 0;
    for (let k = 0; k < n; k++) {
      const i = pick(k);
      way += distance[i] ?? 0;
      lost += height[i] ?? 0;
    }
    return lost > 0 ? way / lost : NaN;
  };
  const ratio = pooled((k) => k);
  if (!Number.isFinite(ratio)) return null;
  const drawn = Array.from({ length: RESAMPLES }, () => pooled(() => Math.floor(rng() * n)));
  return { ratio, ratioLow: quantile(drawn, 0.025), ratioHigh: quantile(drawn, 0.975), lulls: n };
}
