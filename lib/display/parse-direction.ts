import { compassPoint } from "./format-bearing";
import { parseDecimal } from "./parse-decimal";

const DEGREES_BY_POINT = new Map(
  Array.from({ length: 16 }, (_, index) => [compassPoint(index * 22.5), index * 22.5] as const),
);
const WORDS = [
  ["north", "n"],
  ["east", "e"],
  ["south", "s"],
  ["west", "w"],
] as const;

/**
 * A direction as a rider types it, in degrees from 0 to below 360: degrees ("247", "247°", "247,5 deg", 360 counts as 0), or one of the
 * sixteen compass points by letters ("WSW", "w.s.w.") or in words ("west-southwest", "southwesterly", "from the
 * south west"). Null for anything else, also for degrees outside 0 to 360.
 *
 * @example
 * parseDirection("WSW"); // 247.5
 * @example
 * parseDirection("south-west"); // 225
 * @example
 * parseDirection("361"); // null
 */
export function parseDirection(text: string): number | null {
  const plain = text.trim().toLowerCase();
  const degrees = parseDecimal(plain.replace(/\s*(°|deg|degs|degrees?)\s*(true|t)?$/, ""));
  if (degrees !== null) return degrees >= 0 && degrees <= 360 ? degrees % 360 : null;
  let letters = plain
    .replace(/^from\s+/, "")
    .replace(/^the\s+/, "")
    .replace(/[\s.\-\u2010-\u2015_/]/g, "")
    .replace(/(north|east|south|west)er(ly|n)$/, "$1");
  for (const [word, letter] of WORDS) letters = letters.replaceAll(word, letter);
  return DEGREES_BY_POINT.get(letters.toUpperCase()) ?? null;
}
