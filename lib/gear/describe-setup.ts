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
