"use client";

import { useMemo, useSyncExternalStore } from "react";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";
import type { SpeedUnit } from "@/lib/units/speed";
import type { DistanceUnit } from "@/lib/units/length";

/** What every table of stretches gets from the page. */
export type StretchTableContext = {
  readonly timeZone: string;
  readonly speedUnit: SpeedUnit;
  readonly distanceUnit: DistanceUnit;
  readonly cursor: TimeCursor;
  readonly onSelect: (stretch: Stretch) => void;
};

/** Rows of a table drawn at once; a gusty hour has hundreds of bump rides. */
export const ROWS_AT_ONCE = 25;
/** A mark that jumps five times a second is as good as one that jumps with every frame, and costs a tenth. */
const MARK_EVERY_MS = 200;

/** Index of the stretch that a moment lies in, -1 for none. Stretches in order of time, not overlapping. */
export function stretchAt(stretches: readonly Stretch[], timeMs: number | null): number {
  if (timeMs === null) return -1;
  let [low, high] = [0, stretches.length - 1];
  while (low <= high) {
    const middle = (low + high) >> 1;
    const one = stretches[middle];
    if (one === undefined) return -1;
    if (timeMs < one.startMs) high = middle - 1;
    else if (timeMs > one.endMs) low = middle + 1;
    else return middle;
  }
  return -1;
}

/** The row the cursor is in; a moving cursor draws the table anew only when the row changes, at most five times a second. */
export function useCurrentRow(cursor: TimeCursor, stretches: readonly Stretch[]): number {
  const subscribe = useMemo(
    () => (changed: () => void) => {
      let timer: ReturnType<typeof setTimeout> | null = null;
      const stop = cursor.subscribe(() => {
        timer ??= setTimeout(() => {
          timer = null;
          changed();
        }, MARK_EVERY_MS);
      });
      return () => {
        stop();
        if (timer !== null) clearTimeout(timer);
      };
    },
    [cursor],
  );
  return useSyncExternalStore(
    subscribe,
    () => stretchAt(stretches, cursor.get()),
    () => -1,
  );
}
