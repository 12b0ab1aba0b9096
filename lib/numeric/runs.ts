/** A run of samples, both ends inclusive. */
export type Run = { readonly from: number; readonly to: number };

/**
 * The maximal runs of indices 0 to count - 1 for which `holds` is true, in order. Empty when there is none.
 *
 * @example
 * runs(5, (i) => i % 3 !== 0); // [{ from: 1, to: 2 }, { from: 4, to: 4 }]
 */
export function runs(count: number, holds: (index: number) => boolean): Run[] {
  const found: Run[] = [];
  let from = -1;
  for (let i = 0; i <= count; i++) {
    const inside = i < count && holds(i);
    if (inside && from < 0) from = i;
    if (!inside && from >= 0) {
      found.push({ from, to: i - 1 });
      from = -1;
    }
  }
  return found;
}
