import { median, quantile } from "@/lib/numeric/quantile";

import type { TimedPlane } from "./local-velocity";
import { ERROR_SHAPE } from "./smoother-settings";

const WINDOW_S = 20;
/** Steps shorter than a second mostly see the receiver's own filter. */
const STEP_S = 0.95;
/** The calm part of a session shows the receiver; the rest shows the rider. */
const CALM_QUANTILE = 0.12;
/** Expected value of that quantile falls this much short on pure noise. */
const CALM_BIAS = 1.08;
/** Median of a squared standard normal variable: chi-square with one degree of freedom. */
const CHI_SQUARE_MEDIAN = 0.455;
const WINDOW_VALUES_MIN = 12;
/** A receiver is not believed to be better or worse than this (m): common practice, no source. */
const SCALE_M = { least: 0.15, leastCoarse: 0.8, assumed: 1.5, most: 12 } as const;
/** Rounding above this hides the receiver's own noise: medians then only see the grid, so means are taken and the rounding taken off. */
const COARSE_M2 = 0.02;
const CALM_QUANTILE_COARSE = 0.3;

function mean(values: readonly number[]): number {
  let sum = 0;
  for (const value of values) sum += value;
  return sum / values.length;
}

/** Autocovariance of the error at lag `t` seconds for a noise scale of 1 m, without the white part. */
function autocovariance(t: number): number {
  return (
    ERROR_SHAPE.slow ** 2 * Math.exp(-t / ERROR_SHAPE.slowTimeS) +
    ERROR_SHAPE.fast ** 2 * Math.exp(-t / ERROR_SHAPE.fastTimeS)
  );
}

/** Variance of the middle of three fixes about the line through the others for a noise scale of 1 m. */
function residualVariance(before: number, after: number): number {
  const whole = before + after;
  const w = after / whole;
  const u = 1 - w;
  const variance = ERROR_SHAPE.slow ** 2 + ERROR_SHAPE.fast ** 2 + ERROR_SHAPE.white ** 2;
  return (
    variance * (1 + w * w + u * u) -
    2 * w * autocovariance(before) -
    2 * u * autocovariance(after) +
    2 * w * u * autocovariance(whole)
  );
}

/**
 * Noise scale of the receiver, metres a axis (standard deviation of the slow part of its error, see `ERROR_SHAPE`), from the track itself:
 * how far each fix lies off the line between those a second before and after, compared with what a noise scale of one metre would
 * give, robustly over windows of 20 s, of which the calm ones count. `medianStepS` is the usual step, `roundingM2` the
 * variance from the file's rounding, which is taken off. Within about 15 % on modelled tracks;
 * 30 to 50 % high when the rider floats in waves all the time. Too little data gives 1.5 m.
 *
 * @example
 * noiseScaleM({ count: 0, timeS: new Float64Array(0), xM: new Float64Array(0), yM: new Float64Array(0) }, 1); // 1.5
 */
export function noiseScaleM(path: TimedPlane, medianStepS: number, roundingM2 = 0): number {
  const stride = Math.max(1, Math.round(STEP_S / Math.max(medianStepS, 0.02)));
  const { timeS, xM, yM, count } = path;
  const windowScales: number[] = [];
  let values: number[] = [];
  let window = -1;
  const coarse = roundingM2 > COARSE_M2;
  const close = () => {
    if (values.length >= WINDOW_VALUES_MIN)
      windowScales.push(coarse ? mean(values) : median(values) / CHI_SQUARE_MEDIAN);
    values = [];
  };
  for (let i = stride; i + stride < count; i++) {
    const before = (timeS[i] as number) - (timeS[i - stride] as number);
    const after = (timeS[i + stride] as number) - (timeS[i] as number);
    if (before + after > 5 || before + after < 0.5) continue;
    const here = Math.floor((timeS[i] as number) / WINDOW_S);
    if (here !== window) close();
    window = here;
    const w = after / (before + after);
    const offX = (xM[i] as number) - w * (xM[i - stride] as number) - (1 - w) * (xM[i + stride] as number);
    const offY = (yM[i] as number) - w * (yM[i - stride] as number) - (1 - w) * (yM[i + stride] as number);
    const variance = residualVariance(before, after);
    const rounding = coarse ? roundingM2 * (1 + w * w + (1 - w) * (1 - w)) : 0;
    values.push((offX * offX - rounding) / variance, (offY * offY - rounding) / variance);
  }
  close();
  if (windowScales.length === 0) return SCALE_M.assumed;
  if (coarse) {
    const squared = Math.max(0, quantile(windowScales, CALM_QUANTILE_COARSE));
    return Math.min(SCALE_M.most, Math.max(SCALE_M.leastCoarse, Math.sqrt(squared)));
  }
  const scale = Math.sqrt(quantile(windowScales, CALM_QUANTILE)) * CALM_BIAS;
  return Math.min(SCALE_M.most, Math.max(SCALE_M.least, scale));
}
