import { distanceFromM, distanceToM, type DistanceUnit } from "@/lib/units/length";

/** Below this many of the unit the bar is labelled in metres: short miles are hard to read. */
const METRES_BELOW = 0.2;

/**
 * The longest round length (1, 2 or 5 times a power of ten, of the unit or of metres) that fits `maxPx`
 * pixels of `metresPerPx` each. Null when the map has no scale (yet).
 */
export function scaleBarLength(
  metresPerPx: number,
  maxPx: number,
  unit: DistanceUnit,
): { readonly label: string; readonly widthPx: number } | null {
  const longestM = metresPerPx * maxPx;
  if (!(longestM > 0) || !Number.isFinite(longestM)) return null;
  const inMetres = distanceFromM(longestM, unit) < METRES_BELOW;
  const longest = inMetres ? longestM : distanceFromM(longestM, unit);
  const power = 10 ** Math.floor(Math.log10(longest));
  const lead = longest / power;
  const round = Number(((lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power).toPrecision(1));
  const metres = inMetres ? round : distanceToM(round, unit);
  return { label: `${round}\u00a0${inMetres ? "m" : unit}`, widthPx: metres / metresPerPx };
}
