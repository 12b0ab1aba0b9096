import { distanceFromM, type DistanceUnit } from "@/lib/units/length";
import { formatNumber, MISSING, withUnit } from "./format-number";

/** Below half of one of these a distance reads better in metres. */
const METRES_BELOW: Readonly<Record<DistanceUnit, number>> = { NM: 926, km: 1000, mi: 804.672 };

/**
 * A distance in a fixed unit, two decimals, without the unit: for columns, where units never mix.
 * Input in metres; missing gives the dash.
 *
 * @example
 * formatDistance(26840, "km"); // "26.84"
 */
export function formatDistance(metres: number | null, unit: DistanceUnit): string {
  return formatNumber(metres === null ? null : distanceFromM(metres, unit), 2);
}

/**
 * A distance that stands alone: two decimals of the unit, or whole metres when it is short (under half a
 * nautical mile, one kilometre, half a mile).
 *
 * @example
 * showDistance(740, "NM"); // {"value":"740","unit":"m"}
 * @example
 * showDistance(5556, "NM"); // {"value":"3.00","unit":"NM"}
 */
export function showDistance(
  metres: number | null,
  unit: DistanceUnit,
): { readonly value: string; readonly unit: string } {
  if (metres === null || !Number.isFinite(metres)) return { value: MISSING, unit: "" };
  return Math.abs(metres) < METRES_BELOW[unit]
    ? { value: formatNumber(metres, 0), unit: "m" }
    : { value: formatDistance(metres, unit), unit };
}

/**
 * As showDistance, figure and unit in one text.
 *
 * @example
 * distanceWithUnit(1852, "NM"); // "1.00\u00a0NM"
 */
export function distanceWithUnit(metres: number | null, unit: DistanceUnit): string {
  const shown = showDistance(metres, unit);
  return withUnit(shown.value, shown.unit);
}
