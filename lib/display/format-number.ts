/** Stands where a figure is missing; the reason stands beside it or in its tooltip. Never 0. */
export const MISSING = "–";

const MINUS = "\u2212";

/**
 * A number with a fixed count of decimals: decimal point, true minus sign, never "−0.0". No grouping (figures
 * stay short by their unit). Null, NaN and infinities give the dash of a missing figure.
 *
 * @example
 * formatNumber(-0.04, 1); // "0.0"
 * @example
 * formatNumber(16.94, 1); // "16.9"
 */
export function formatNumber(value: number | null, decimals: number): string {
  if (value === null || !Number.isFinite(value)) return MISSING;
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? MINUS + text : text;
}

/**
 * As formatNumber, with a plus sign before what is above zero: for changes and differences.
 *
 * @example
 * formatSigned(0.5, 1); // "+0.5"
 */
export function formatSigned(value: number | null, decimals: number): string {
  const text = formatNumber(value, decimals);
  return value !== null && value > 0 && Number(text) !== 0 ? `+${text}` : text;
}

/**
 * A figure and its unit kept on one line by a no-break space; a missing figure stays without unit, and the
 * degree sign follows without space.
 *
 * @example
 * withUnit("16.9", "kn"); // "16.9\u00a0kn"
 * @example
 * withUnit("3.0", "°"); // "3.0°"
 */
export function withUnit(value: string, unit: string): string {
  if (value === MISSING || unit === "") return value;
  return unit === "°" ? value + unit : `${value}\u00a0${unit}`;
}
