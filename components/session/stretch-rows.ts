"use client";

import { useEffect, useRef, type RefObject } from "react";
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

/**
 * Marks the row of a table's body that the cursor is in, by hand: a moving cursor draws no table anew. The rows stand in
 * the order of the stretches; a row that is not drawn is not marked.
 */
export function useRowMark(
  cursor: TimeCursor,
  stretches: readonly Stretch[],
): RefObject<HTMLTableSectionElement | null> {
  const body = useRef<HTMLTableSectionElement>(null);
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | null = null;
    let marked: Element | null = null;
    const mark = (row: Element | null) => {
      if (row === marked) return;
      marked?.removeAttribute("aria-current");
      marked?.classList.remove("bg-shell");
      row?.setAttribute("aria-current", "true");
      row?.classList.add("bg-shell");
      marked = row;
    };
    const follow = () => {
      timer = null;
      mark(body.current?.children[stretchAt(stretches, cursor.get())] ?? null);
    };
    follow();
    const stop = cursor.subscribe(() => {
      timer ??= setTimeout(follow, MARK_EVERY_MS);
    });
    return () => {
      stop();
      if (timer !== null) clearTimeout(timer);
      mark(null);
    };
  }, [cursor, stretches]);
  return body;
}
