import { median, quantile } from "@/lib/numeric/quantile";

import type { TimedPlane } from "./local-velocity";
import { ERROR_SHAPE } from "./smoother-settings";

/** A receiver's noise: the scale of its correlated part (see `ERROR_SHAPE`) and white variance beyond that shape, m2 a axis. */
export type NoiseSplit = { readonly scaleM: number; readonly whiteM2: number };

const WINDOW_S = 20;
const WINDOW_VALUES_MIN = 12;
const WINDOWS_MIN = 8;
/** The calm windows, in which the rider's own motion tells least. */
const CALM_SHARE = 0.3;
/** Coarser recordings see too much of the rider between fixes. */
const STEP_S_MAX = 1.3;
/** White noise counts from this multiple of what the usual shape has: below it the two lags cannot tell. */
const SURELY_WHITE = 2;
/** What surges and turns add to the longer lag's mean square in a window that is not calm (m2), and the noise from which calm is hidden. Trials, no source. */
const MOTION_M2 = 0.7;
const HIDING_M2 = 1.5;
/** However white, some slow error stays that differences cannot see. */
const SLOW_OVER_WHITE = 0.4;

/** Variance of the middle of three fixes about the line through the others, for a correlated scale of 1 m and a lag in seconds. */
function correlatedShare(lagS: number): number {
  const of = (sd: number, timeS: number) => {
    const near = Math.exp(-lagS / timeS);
    return sd * sd * (1.5 - 2 * near + 0.5 * near * near);
  };
  return of(ERROR_SHAPE.slow, ERROR_SHAPE.slowTimeS) + of(ERROR_SHAPE.fast, ERROR_SHAPE.fastTimeS);
}

/**
 * Tells a nearly white receiver from the usual one. Correlated error moves a fix further off the line between its neighbours two
 * seconds away than off that between those one second away; white error does not. Both are looked at in the calm windows of 20 s; the
 * rider's own motion makes the longer lag look larger, so the white part is rather too small than too large. When it is not
 * surely more than the usual shape has, the scale stays and there is none beyond it. `scaleM` is what `noiseScaleM` found.
 *
 * @example
 * splitWhite({ count: 0, timeS: new Float64Array(0), xM: new Float64Array(0), yM: new Float64Array(0) }, 1, 1.5); // { scaleM: 1.5, whiteM2: 0 }
 */
export function splitWhite(path: TimedPlane, medianStepS: number, scaleM: number): NoiseSplit {
  const usual = { scaleM, whiteM2: 0 };
  if (!(medianStepS <= STEP_S_MAX)) return usual;
  const stride = Math.max(1, Math.round(1 / Math.max(medianStepS, 0.02)));
  const lagS = stride * medianStepS;
  const windows = calmWindows(path, stride, lagS);
  if (windows.length < WINDOWS_MIN) return usual;
  const limit = quantile(
    windows.map((w) => w.near),
    CALM_SHARE,
  );
  const calm = windows.filter((w) => w.near <= limit);
  const near = median(calm.map((w) => w.near));
  const far = median(calm.map((w) => w.far));
  const nearShare = correlatedShare(lagS);
  const farShare = correlatedShare(2 * lagS);
  // Where noise hides which windows are calm, they hold a rider's usual motion.
  const motion = near > HIDING_M2 ? MOTION_M2 : 0;
  const correlated = Math.max(0, (far - near - motion) / (farShare - nearShare));
  const whiteM2 = (near - nearShare * correlated) / 1.5;
  if (whiteM2 < SURELY_WHITE * (ERROR_SHAPE.white * scaleM) ** 2) return usual;
  const scale = Math.max(Math.sqrt(correlated), SLOW_OVER_WHITE * Math.sqrt(whiteM2));
  return scale < scaleM ? { scaleM: scale, whiteM2 } : usual;
}

type Calm = { readonly near: number; readonly far: number };

/** Mean squares of both residuals in windows of evenly spaced fixes. */
function calmWindows(path: TimedPlane, stride: number, lagS: number): Calm[] {
  const { timeS, xM, yM, count } = path;
  const found: Calm[] = [];
  let sums = { near: 0, far: 0, n: 0, window: -1 };
  const close = () => {
    if (sums.n >= WINDOW_VALUES_MIN)
      found.push({ near: sums.near / (2 * sums.n), far: sums.far / (2 * sums.n) });
  };
  for (let i = 2 * stride; i + 2 * stride < count; i++) {
    const t = timeS[i] as number;
    const even = (k: number) => Math.abs((timeS[i + k * stride] as number) - t - k * lagS) < 0.15 * lagS;
    if (!even(-2) || !even(-1) || !even(1) || !even(2)) continue;
    const window = Math.floor(t / WINDOW_S);
    if (window !== sums.window) {
      close();
      sums = { near: 0, far: 0, n: 0, window };
    }
    for (const axis of [xM, yM]) {
      const here = axis[i] as number;
      const off = (k: number) => here - ((axis[i - k] as number) + (axis[i + k] as number)) / 2;
      sums.near += off(stride) ** 2;
      sums.far += off(2 * stride) ** 2;
    }
    sums.n++;
  }
  close();
  return found;
}
