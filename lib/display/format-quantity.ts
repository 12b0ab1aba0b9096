import { formatNumber, formatSigned, withUnit } from "./format-number";

/**
 * A share (0 to 1) as whole per cent without the sign, so that the sign stands small behind it.
 *
 * @example
 * formatShare(0.914); // "91"
 */
export function formatShare(share: number | null, decimals = 0): string {
  return formatNumber(share === null ? null : share * 100, decimals);
}

/**
 * A share as per cent in running text.
 *
 * @example
 * shareWithUnit(0.914); // "91\u00a0%"
 */
export function shareWithUnit(share: number | null, decimals = 0): string {
  return withUnit(formatShare(share, decimals), "%");
}

/**
 * Temperature in degrees Celsius, one decimal.
 *
 * @example
 * temperatureWithUnit(14.5); // "14.5\u00a0°C"
 */
export function temperatureWithUnit(celsius: number | null): string {
  return withUnit(formatNumber(celsius, 1), "°C");
}

/**
 * A foil's area in whole square centimetres; input in m².
 *
 * @example
 * foilAreaWithUnit(0.09); // "900\u00a0cm²"
 */
export function foilAreaWithUnit(squareMetres: number | null): string {
  return withUnit(formatNumber(squareMetres === null ? null : squareMetres * 1e4, 0), "cm²");
}

/**
 * A hand wing's area in square metres, one decimal.
 *
 * @example
 * wingAreaWithUnit(4.5); // "4.5\u00a0m²"
 */
export function wingAreaWithUnit(squareMetres: number | null): string {
  return withUnit(formatNumber(squareMetres, 1), "m²");
}

/**
 * A dimension of gear in whole millimetres; input in metres.
 *
 * @example
 * millimetresWithUnit(0.82); // "820\u00a0mm"
 */
export function millimetresWithUnit(metres: number | null): string {
  return withUnit(formatNumber(metres === null ? null : metres * 1000, 0), "mm");
}

/**
 * A small angle of gear (shim, angle difference), signed, one decimal or as many as given.
 *
 * @example
 * formatAngle(0.5); // "+0.5°"
 */
export function formatAngle(degrees: number | null, decimals = 1): string {
  return withUnit(formatSigned(degrees, decimals), "°");
}

/**
 * Mass in whole kilograms.
 *
 * @example
 * massWithUnit(84.6); // "85\u00a0kg"
 */
export function massWithUnit(kilograms: number | null): string {
  return withUnit(formatNumber(kilograms, 0), "kg");
}

/**
 * A period of waves or of a sampling in seconds, one decimal.
 *
 * @example
 * secondsWithUnit(4.6); // "4.6\u00a0s"
 */
export function secondsWithUnit(seconds: number | null): string {
  return withUnit(formatNumber(seconds, 1), "s");
}

/**
 * A height in metres (waves, energy height), one decimal or as many as given.
 *
 * @example
 * heightWithUnit(1.25, 2); // "1.25\u00a0m"
 */
export function heightWithUnit(metres: number | null, decimals = 1): string {
  return withUnit(formatNumber(metres, decimals), "m");
}
