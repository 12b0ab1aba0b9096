import { invariant } from "@/lib/errors/invariant";

/** A turning point of a series: where it stands and whether it is a peak or a lull. */
export type TurningPoint = { readonly index: number; readonly kind: "peak" | "lull" };

/**
 * Turning points of a series by a zig-zag with hysteresis: alternately peaks and lulls, each at least `swing` away
 * from the one before. The last point is the extreme reached since the last confirmed turn when it too is a swing away; a flat
 * extreme counts at its first sample. Samples from `from` to `to` inclusive are looked at. A series that
 * never swings that far, an empty range, or values that are not finite at the start give an empty list; a later NaN is passed over.
 *
 * @throws Error when `swing` is not positive.
 * @example
 * turningPoints([0, 3, 1, 4, 0], 2, { from: 0, to: 4 }).map((p) => p.index); // [0, 1, 2, 3, 4]
 */
export function turningPoints(
  series: ArrayLike<number>,
  swing: number,
  range: { readonly from: number; readonly to: number },
): TurningPoint[] {
  invariant(swing > 0, "a swing is positive");
  const found: TurningPoint[] = [];
  let low = range.from;
  let high = range.from;
  let direction = 0;
  for (let i = range.from; i <= range.to; i++) {
    const value = series[i] ?? NaN;
    if (direction >= 0 && value > (series[high] ?? NaN)) high = i;
    if (direction <= 0 && value < (series[low] ?? NaN)) low = i;
    const drop = (series[high] ?? NaN) - value;
    const rise = value - (series[low] ?? NaN);
    if (direction === 0 && (rise >= swing || drop >= swing)) {
      const rising = rise >= swing;
      found.push(rising ? { index: low, kind: "lull" } : { index: high, kind: "peak" });
      direction = rising ? 1 : -1;
      if (rising) high = i;
      else low = i;
    } else if (direction > 0 && drop >= swing) {
      found.push({ index: high, kind: "peak" });
      direction = -1;
      low = i;
    } else if (direction < 0 && rise >= swing) {
      found.push({ index: low, kind: "lull" });
      direction = 1;
      high = i;
    }
  }
  if (direction > 0) found.push({ index: high, kind: "peak" });
  if (direction < 0) found.push({ index: low, kind: "lull" });
  return found;
}
