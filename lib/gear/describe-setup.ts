import type { SetupInput } from "./part-schema";

/**
 * A shim stack in words of the trade: "no shim", "+½° shim", "-0.75° shim".
 *
 * @example
 * describeShim(0.5); // "+½° shim"
 */
export function describeShim(shimStackDeg: number): string {
  if (shimStackDeg === 0) return "no shim";
  const size = Math.abs(shimStackDeg);
  const whole = Math.floor(size);
  const fraction = { 0: "", 0.25: "¼", 0.5: "½", 0.75: "¾" }[size - whole];
  const text = fraction === undefined ? String(size) : `${whole === 0 ? "" : whole}${fraction}`;
  return `${shimStackDeg > 0 ? "+" : "−"}${text}° shim`;
}

/**
 * A mast position in words: "mast at reference", "mast +60 mm" (forward), or null when it was not entered.
 *
 * @example
 * describeMastPosition(60); // "mast +60 mm"
 */
export function describeMastPosition(mastPositionMm: number | null): string | null {
  if (mastPositionMm === null) return null;
  if (mastPositionMm === 0) return "mast at reference";
  return `mast ${mastPositionMm > 0 ? "+" : "−"}${Math.abs(mastPositionMm)} mm`;
}

type Adjusted = Pick<
  SetupInput,
  | "frontWingId"
  | "rearWingId"
  | "fuselageId"
  | "mastId"
  | "boardId"
  | "handWingId"
  | "shimSetId"
  | "mastPositionMm"
  | "shimStackDeg"
>;

const ADJUSTMENTS = [
  "frontWingId",
  "rearWingId",
  "fuselageId",
  "mastId",
  "boardId",
  "handWingId",
  "mastPositionMm",
  "shimStackDeg",
] as const;

export type Adjustment = (typeof ADJUSTMENTS)[number];

/**
 * Which parts or adjustments differ between two setups, in a fixed order. The shim set is left out: the stack
 * says what is under the rear wing. One entry means a one-change pair.
 */
export function setupDifferences(a: Adjusted, b: Adjusted): Adjustment[] {
  return ADJUSTMENTS.filter((key) => a[key] !== b[key]);
}
