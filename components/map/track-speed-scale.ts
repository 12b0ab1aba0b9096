import { speedScale, type SpeedScale } from "@/lib/display/speed-ramp";
import { at } from "@/lib/errors/invariant";
import { FLAG_GAP, FLAG_ON_FOIL, FLAG_ON_WATER, type SpeedSeries } from "@/lib/track/speed-series";
import type { SpeedUnit } from "@/lib/units/speed";

/** A ten-thousandth of samples is enough to place a quantile; more would only cost time. */
const SAMPLES_MAX = 20_000;

/**
 * The speed scale of a session: from the 5th to the 98th percentile of the speeds on foil (of the speeds on
 * the water when there was none), widened to whole numbers of the unit, so that single outliers do not take
 * the colours from the rest. Map and unrolled run use the same one.
 */
export function trackSpeedScale(series: SpeedSeries, unit: SpeedUnit): SpeedScale {
  const onFoil = speedsWith(series, FLAG_ON_WATER | FLAG_ON_FOIL);
  const speeds = onFoil.length > 0 ? onFoil : speedsWith(series, FLAG_ON_WATER);
  if (speeds.length === 0) return speedScale(Number.NaN, Number.NaN, unit);
  speeds.sort();
  const quantile = (share: number) => at(speeds, Math.round(share * (speeds.length - 1)));
  return speedScale(quantile(0.05), quantile(0.98), unit);
}

function speedsWith(series: SpeedSeries, wanted: number): Float32Array {
  const stride = Math.max(1, Math.floor(series.count / SAMPLES_MAX));
  const speeds = new Float32Array(Math.ceil(series.count / stride));
  let filled = 0;
  for (let i = 0; i < series.count; i += stride) {
    const flags = at(series.flags, i);
    const speed = at(series.speedMps, i);
    if ((flags & wanted) === wanted && (flags & FLAG_GAP) === 0 && Number.isFinite(speed)) {
      speeds[filled++] = speed;
    }
  }
  return speeds.subarray(0, filled);
}
