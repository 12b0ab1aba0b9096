import { invariant } from "@/lib/errors/invariant";

/**
 * The value of a column at a fractional index, linear between samples, the end values outside.
 *
 * @throws Error when the column is empty.
 * @example
 * valueAt([0, 10, 20], 1.25); // 12.5
 */
export function valueAt(column: ArrayLike<number>, index: number): number {
  invariant(column.length > 0, "a column has samples");
  const last = column.length - 1;
  const place = Math.max(0, Math.min(last, index));
  const below = Math.floor(place);
  const low = column[below] ?? NaN;
  if (below === last) return low;
  return low + (place - below) * ((column[below + 1] ?? NaN) - low);
}

/**
 * The index of the last element that is not above a value in an ascending column, by halving; -1 when all are above.
 *
 * @example
 * lastNotAbove([0, 2, 2, 5], 2); // 2
 */
export function lastNotAbove(ascending: ArrayLike<number>, value: number): number {
  let low = -1;
  let high = ascending.length;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((ascending[middle] ?? Infinity) <= value) low = middle;
    else high = middle;
  }
  return low;
}
