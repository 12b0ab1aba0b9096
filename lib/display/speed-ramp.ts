import { speedFromMps, speedToMps, type SpeedUnit } from "@/lib/units/speed";
import type { Theme } from "./theme-tokens";

/*
 * Even steps of OKLCH lightness (Ottosson 2020), so that order survives every colour-vision deficiency and a grey
 * print: on light water slow is teal, fast is dark violet; on dark water slow is deep teal, fast is pale. Each step
 * keeps 3:1 or more to the map's water and land, to the sheet and the paper of its theme.
 */
const RAMPS: Readonly<Record<Theme, readonly string[]>> = {
  light: ["#399187", "#1a8087", "#036e85", "#0d5b80", "#1d4777", "#27336a", "#2b2059", "#2b0c44"],
  dark: ["#28809a", "#3993a3", "#4da5ab", "#65b7b3", "#7dc9bb", "#97dbc3", "#b2eccc", "#cefcd6"],
};

/** Number of speed bands, slow to fast. */
export const SPEED_BANDS = 8;

/**
 * The colours of the speed bands, slow to fast.
 *
 * @example
 * speedRamp("light").length; // 8
 */
export function speedRamp(theme: Theme): readonly string[] {
  return RAMPS[theme];
}

/** Bounds of the speed bands; the first and the last band are open below and above. */
export type SpeedScale = { readonly lowMps: number; readonly highMps: number };

/**
 * A speed scale whose ends are whole numbers of the unit, wide enough for the speeds given. Speeds in m/s; an
 * empty or reversed interval gives a scale one unit wide per band from its low end.
 *
 * @example
 * speedScale(5, 9.9, "m/s"); // {"lowMps":5,"highMps":10}
 */
export function speedScale(lowMps: number, highMps: number, unit: SpeedUnit): SpeedScale {
  const low = Number.isFinite(lowMps) ? Math.max(0, Math.floor(speedFromMps(lowMps, unit) + 1e-9)) : 0;
  const wanted = Number.isFinite(highMps) ? Math.ceil(speedFromMps(highMps, unit) - 1e-9) : 0;
  const high = wanted > low ? wanted : low + SPEED_BANDS;
  return { lowMps: speedToMps(low, unit), highMps: speedToMps(high, unit) };
}

/**
 * The band of a speed, 0 to SPEED_BANDS - 1; null for NaN.
 *
 * @example
 * speedBand(9.9, { lowMps: 2, highMps: 10 }); // 7
 */
export function speedBand(mps: number, scale: SpeedScale): number | null {
  if (Number.isNaN(mps)) return null;
  const share = (mps - scale.lowMps) / (scale.highMps - scale.lowMps);
  return Math.min(SPEED_BANDS - 1, Math.max(0, Math.floor(share * SPEED_BANDS)));
}

/**
 * The lower bounds of the bands in m/s and the upper bound of the last: SPEED_BANDS + 1 numbers.
 *
 * @example
 * speedBandEdges({ lowMps: 2, highMps: 10 }); // [2, 3, 4, 5, 6, 7, 8, 9, 10]
 */
export function speedBandEdges(scale: SpeedScale): number[] {
  const step = (scale.highMps - scale.lowMps) / SPEED_BANDS;
  return Array.from({ length: SPEED_BANDS + 1 }, (_, i) => scale.lowMps + i * step);
}
