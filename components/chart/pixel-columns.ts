/** Least and most of the values that fall on one pixel column; NaN where the column has none. */
export type PixelColumns = { readonly least: Float32Array; readonly most: Float32Array };

/**
 * Folds evenly spaced values into `width` pixel columns and keeps the least and the most of each, so that a long
 * series draws in one pass and no peak is lost. Value `i` lies at sample position `i`; samples `from` to `to`
 * (exclusive, may be fractions) fill the width. NaN values are gaps: they are skipped, and a column of gaps is NaN.
 */
export function pixelColumns(
  values: ArrayLike<number>,
  { from, to, width }: { from: number; to: number; width: number },
): PixelColumns {
  const columns = Math.max(0, Math.floor(width));
  const least = new Float32Array(columns).fill(Number.NaN);
  const most = new Float32Array(columns).fill(Number.NaN);
  const span = to - from;
  if (!(span > 0)) return { least, most };
  const first = Math.max(0, Math.ceil(from));
  const last = Math.min(values.length - 1, Math.ceil(to) - 1);
  for (let i = first; i <= last; i += 1) {
    const value = values[i] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    const column = Math.min(columns - 1, Math.floor(((i - from) / span) * columns));
    if (!((least[column] ?? Number.NaN) <= value)) least[column] = value;
    if (!((most[column] ?? Number.NaN) >= value)) most[column] = value;
  }
  return { least, most };
}
