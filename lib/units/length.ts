/** Exact by definition. Source: SI Brochure 9th ed. (nautical mile, 1929 conference). */
export const METRES_PER_NM = 1852;
/** Exact by definition: international mile. Source: NIST SP 811 (2008), B.8. */
export const METRES_PER_MILE = 1609.344;

export type DistanceUnit = "NM" | "km" | "mi";

const FACTORS: Readonly<Record<DistanceUnit, number>> = { NM: METRES_PER_NM, km: 1000, mi: METRES_PER_MILE };

/**
 * Metres to the chosen unit. NaN stays NaN.
 *
 * @example
 * distanceFromM(3704, "NM"); // 2
 */
export function distanceFromM(metres: number, unit: DistanceUnit): number {
  return metres / FACTORS[unit];
}

/**
 * The chosen unit to metres. NaN stays NaN.
 *
 * @example
 * distanceToM(2, "NM"); // 3704
 */
export function distanceToM(value: number, unit: DistanceUnit): number {
  return value * FACTORS[unit];
}
