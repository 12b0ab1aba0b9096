import tzLookup from "@photostructure/tz-lookup";

/**
 * The IANA time zone at a place, from a map of land and territorial waters rounded to a few kilometres; on the open sea the
 * nautical zone. UTC when the position is not a number or does not exist.
 *
 * In: degrees WGS84. Source: the package's own grid, made from the timezone boundary data of OpenStreetMap.
 *
 * @example
 * timeZoneAt(57.12, 9.32); // "Europe/Copenhagen"
 * @example
 * timeZoneAt(NaN, 9.32); // "UTC"
 */
export function timeZoneAt(latDeg: number, lonDeg: number): string {
  if (!(Math.abs(latDeg) <= 90) || !(Math.abs(lonDeg) <= 180)) return "UTC";
  return tzLookup(latDeg, lonDeg);
}
