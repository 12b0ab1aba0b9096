import { MISSING } from "./format-number";

const POINTS = [
  "N",
  "NNE",
  "NE",
  "ENE",
  "E",
  "ESE",
  "SE",
  "SSE",
  "S",
  "SSW",
  "SW",
  "WSW",
  "W",
  "WNW",
  "NW",
  "NNW",
] as const;

const wrapped = (degrees: number) => ((degrees % 360) + 360) % 360;

/**
 * A true bearing or wind direction as three digits, 000° to 359°, degree sign without space. Any finite angle
 * is wrapped; missing gives the dash.
 *
 * @example
 * formatBearing(45); // "045°"
 * @example
 * formatBearing(359.7); // "000°"
 */
export function formatBearing(degrees: number | null): string {
  if (degrees === null || !Number.isFinite(degrees)) return MISSING;
  return `${String(Math.round(wrapped(degrees)) % 360).padStart(3, "0")}°`;
}

/**
 * The nearest of sixteen compass points.
 *
 * @example
 * compassPoint(247); // "WSW"
 */
export function compassPoint(degrees: number | null): string {
  if (degrees === null || !Number.isFinite(degrees)) return MISSING;
  return POINTS[Math.round(wrapped(degrees) / 22.5) % 16] ?? MISSING;
}

/**
 * Bearing and compass point together, as in "from 225° (SW)".
 *
 * @example
 * bearingInWords(225); // "225° (SW)"
 */
export function bearingInWords(degrees: number | null): string {
  const bearing = formatBearing(degrees);
  return bearing === MISSING ? bearing : `${bearing} (${compassPoint(degrees)})`;
}

/**
 * Angle to the wind with the side in words: port is negative, starboard positive, -180 to 180.
 *
 * @example
 * windAngleInWords(-45.2); // "45° port"
 */
export function windAngleInWords(degrees: number | null): string {
  if (degrees === null || !Number.isFinite(degrees)) return MISSING;
  const signed = wrapped(degrees + 180) - 180;
  const size = Math.round(Math.abs(signed));
  if (size === 0 || size === 180) return `${size}°`;
  return `${size}° ${signed < 0 ? "port" : "starboard"}`;
}
