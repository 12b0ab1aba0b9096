import type { QualityGrade } from "@/lib/track/quality";
import { FLAG_DROPOUT, FLAG_GAP, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";
import { METRES_PER_NM } from "@/lib/units/length";
import type { Best, BestKey, Withheld } from "./analysis";
import { excessOfMaximum } from "./excess-of-maximum";
import {
  fastestBetweenKnots,
  fastestOverDistance,
  fastestOverTime,
  fastestSeparate,
  rivalSpeeds,
  type Window,
} from "./fastest-window";
import { filteredShareSe, meanSpeedSe, systematicSpeedSe } from "./mean-speed-se";
import { wayCurveOf, withWayFromSpeed, type WayCurve } from "./way-curve";

type BestWindow = { readonly timeS: number } | { readonly lengthM: number };

/** The windows of the bests. */
export const BEST_WINDOWS: Readonly<Record<BestKey, BestWindow>> = {
  s2: { timeS: 2 },
  s10: { timeS: 10 },
  s60: { timeS: 60 },
  s600: { timeS: 600 },
  s3600: { timeS: 3600 },
  m100: { lengthM: 100 },
  m250: { lengthM: 250 },
  m500: { lengthM: 500 },
  m1000: { lengthM: 1000 },
  nm: { lengthM: METRES_PER_NM },
};

/** Below quality B a window shorter than this (s) says more about the receiver than about the rider. */
export const SHORT_WINDOW_S = 5;
export const TENS = 5;

export type BestFigures = {
  readonly bests: Readonly<Record<BestKey, Best | Withheld>>;
  readonly bestTens: readonly Best[];
  readonly bestTensMeanMps: number | null;
};

/**
 * A window this long may pass over a hole of some seconds: the straight way across is no longer than the one ridden, so a best is
 * rather too slow for it, and only a little. Our choice, no source.
 */
const LONG_M = 500;
const LONG_S = 60;
const BRIDGED_S = 15;

/** Windows up to this long (s) hold no dropout. */
const CLOSE_S = 10;

/**
 * How much of the expected excess is taken off. The rivals' own speeds are spread wider than the true ones by the same
 * errors, so the whole of it would be too much. Trials on modelled sessions, no published source.
 */
const EXCESS_SHARE = 0.7;
/** A top over a second or two is cut off by the smoother as well, which makes up for half of it. */
const EXCESS_SHARE_SHORT = 0.4;

/** Windows from here on (s) slide over each other in many more places than the separate rivals that are counted. */
const SLIDING_S = 30;

function excessShare(timeS: number): number {
  if (timeS < SHORT_WINDOW_S) return EXCESS_SHARE_SHORT;
  return timeS < SLIDING_S ? EXCESS_SHARE : 1;
}

/** What the length of a weaving way under noise is uncertain by, as a share of it. Trials, no source. */
const WEAVING_SHARE_SE = 0.002;

/** The best with the expected excess of a maximum among near rivals taken off. */
function withoutExcess(best: Best, curve: WayCurve): Best {
  const timeS = (best.endMs - best.startMs) / 1000;
  const excess = excessOfMaximum(rivalSpeeds(curve, timeS, best.speedMps - 3 * best.seMps), best.seMps);
  return {
    ...best,
    speedMps: best.speedMps - excessShare(timeS) * excess,
  };
}

/**
 * The fastest mean speeds of a stretch over fixed times and distances, each with its standard error.
 *
 * Exact over the way curve of the series: straight pieces between its samples. The 2 s window may also begin between
 * them, every quarter of a second, on the integral of the stiff smoother's speed. A window never leaves the water and
 * never spans a gap, but for 60 s, 500 m and more one of at most 15 s; up to 10 s it holds no dropout either. Most of the expected excess of the maximum is taken off (so
 * a part with fewer rivals may show a little more than the whole). Withheld: `too_short` when no unbroken stretch
 * is long enough; `quality` for windows under 5 s when the recording is graded below B.
 * In: the series, the stretch (UTC ms), the grade and whether the recorder smoothed (see `isFiltered`). Out: see `BestFigures`; `bestTens` are up to five 10 s windows
 * that do not overlap, fastest first, uncorrected, and their mean when there are five.
 */
export function bestFigures(
  series: SpeedSeries,
  stretch: Stretch,
  recorder: { readonly grade: QualityGrade; readonly filtered?: boolean },
): BestFigures {
  const middling = wayCurveOf(series, stretch);
  const long = wayCurveOf(series, stretch, { bridgedS: BRIDGED_S });
  const close = wayCurveOf(series, stretch, { breaks: FLAG_GAP | FLAG_DROPOUT });
  const withSe = (window: Window): Best => ({ ...window, seMps: meanSpeedSe(series, window) });
  const stated = (best: Best): Best => {
    const timeS = (best.endMs - best.startMs) / 1000;
    const cut = recorder.filtered ? filteredShareSe(timeS) * best.speedMps : 0;
    return {
      ...best,
      seMps: Math.hypot(best.seMps, systematicSpeedSe(series, best), cut, WEAVING_SHARE_SE * best.speedMps),
    };
  };
  const find = (key: BestKey): Best | Withheld => {
    const wanted = BEST_WINDOWS[key];
    if ("lengthM" in wanted) {
      const curve = wanted.lengthM < LONG_M ? middling : long;
      const found = fastestOverDistance(curve, wanted.lengthM);
      return found ? stated(withoutExcess(withSe(found), curve)) : { withheld: "too_short" };
    }
    const { timeS } = wanted;
    const short = timeS < SHORT_WINDOW_S;
    if (short && recorder.grade > "B") return { withheld: "quality" };
    const on = short
      ? withWayFromSpeed(close, series)
      : timeS <= CLOSE_S
        ? close
        : timeS < LONG_S
          ? middling
          : long;
    const found = short ? fastestBetweenKnots(on, timeS) : fastestOverTime(on, timeS);
    if (!found) return { withheld: "too_short" };
    return stated(withoutExcess(withSe(found), on));
  };
  const tens = fastestSeparate(close, 10, TENS).map((window) => stated(withSe(window)));
  return {
    bests: {
      s2: find("s2"),
      s10: find("s10"),
      s60: find("s60"),
      s600: find("s600"),
      s3600: find("s3600"),
      m100: find("m100"),
      m250: find("m250"),
      m500: find("m500"),
      m1000: find("m1000"),
      nm: find("nm"),
    },
    bestTens: tens,
    bestTensMeanMps: tens.length === TENS ? tens.reduce((sum, ten) => sum + ten.speedMps, 0) / TENS : null,
  };
}
