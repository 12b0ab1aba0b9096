/**
 * One knot is one nautical mile an hour, exactly 1852/3600 m/s.
 * Source: SI Brochure 9th ed., table 8 (nautical mile); BIPM non-SI units.
 */
export const MPS_PER_KNOT = 1852 / 3600;
/** Exact: 1000/3600. Source: SI Brochure 9th ed. */
export const MPS_PER_KMH = 1000 / 3600;
/** Exact: the international mile is 1609.344 m. Source: NIST SP 811 (2008), B.8. */
export const MPS_PER_MPH = 1609.344 / 3600;

export type SpeedUnit = "kn" | "km/h" | "mph" | "m/s";

const FACTORS: Readonly<Record<SpeedUnit, number>> = {
  kn: MPS_PER_KNOT,
  "km/h": MPS_PER_KMH,
  mph: MPS_PER_MPH,
  "m/s": 1,
};

/**
 * Metres per second to the chosen unit. NaN stays NaN.
 *
 * @example
 * speedFromMps(10, "km/h"); // 36
 */
export function speedFromMps(mps: number, unit: SpeedUnit): number {
  return mps / FACTORS[unit];
}

/**
 * The chosen unit to metres per second. NaN stays NaN.
 *
 * @example
 * speedToMps(36, "km/h"); // 10
 */
export function speedToMps(value: number, unit: SpeedUnit): number {
  return value * FACTORS[unit];
}
