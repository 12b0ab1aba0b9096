import { quantile } from "@/lib/numeric/quantile";

/** Middle and spread of one figure within one group: quantiles 0, 0.25, 0.5, 0.75, 1 of the values present. */
export type Spread = {
  readonly count: number;
  readonly min: number;
  readonly low: number;
  readonly median: number;
  readonly high: number;
  readonly max: number;
};

/**
 * The five-number summary of the values that are there (nulls are left out), or null when none is.
 * Source: Tukey (1977), Exploratory Data Analysis; quantiles of R type 7 (Hyndman and Fan 1996).
 *
 * @example
 * spreadOf([3, null, 1, 2]); // { count: 3, min: 1, low: 1.5, median: 2, high: 2.5, max: 3 }
 */
export function spreadOf(values: readonly (number | null)[]): Spread | null {
  const present = values.filter((value) => value !== null && Number.isFinite(value)) as number[];
  if (present.length === 0) return null;
  const at = (share: number) => quantile(present, share);
  return {
    count: present.length,
    min: at(0),
    low: at(0.25),
    median: at(0.5),
    high: at(0.75),
    max: at(1),
  };
}
