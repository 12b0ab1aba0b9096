import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";
import { formatNumber, formatSigned, withUnit } from "./format-number";

/**
 * A speed as a figure without its unit, one decimal. Input in m/s; missing gives the dash.
 *
 * @example
 * formatSpeed(10, "km/h"); // "36.0"
 * @example
 * formatSpeed(null, "kn"); // "–"
 */
export function formatSpeed(mps: number | null, unit: SpeedUnit): string {
  return formatNumber(mps === null ? null : speedFromMps(mps, unit), 1);
}

/**
 * A speed with its unit, on one line.
 *
 * @example
 * speedWithUnit(9.26, "kn"); // "18.0\u00a0kn"
 */
export function speedWithUnit(mps: number | null, unit: SpeedUnit): string {
  return withUnit(formatSpeed(mps, unit), unit);
}

/**
 * A difference of two speeds with its sign, one decimal, without unit.
 *
 * @example
 * formatSpeedChange(-1.852, "km/h"); // "−6.7"
 */
export function formatSpeedChange(mps: number | null, unit: SpeedUnit): string {
  return formatSigned(mps === null ? null : speedFromMps(mps, unit), 1);
}
