import { distanceM } from "@/lib/geo/distance-m";
import { wrapLongitudeDeg } from "@/lib/geo/longitude";

import { evenWholeSeconds } from "./even-whole-seconds";
import { type FixDraft, pickFixes } from "./fix-draft";

/** Fixes closer in time than this are one fix: no receiver of the trade records faster than 25 Hz (common practice, no source). */
const SAME_TIME_MS = 20;
/** Places of one instant further apart than this cannot both be believed. */
const SAME_PLACE_M = 20;

/** What ordering and merging did. `reordered` counts fixes that were earlier than one before them. */
export type OrderedFixes = { readonly draft: FixDraft; readonly reordered: number; readonly merged: number };

/**
 * Step 2 of the cleaning: time order, and one fix an instant. Fixes of one instant (within 20 ms) become their mean place; if they are
 * more than 20 m apart, the first one stays. Whole seconds written twice beside a missing one are evened out first. The order of fixes with equal times is that of the file.
 *
 * @example
 * orderFixes({ count: 2, timeMs: Float64Array.of(2000, 1000), latDeg: Float64Array.of(1, 2), lonDeg: Float64Array.of(0, 0), source: Uint32Array.of(0, 1) }).reordered; // 1
 */
export function orderFixes(draft: FixDraft): OrderedFixes {
  let reordered = 0;
  let latest = -Infinity;
  for (let i = 0; i < draft.count; i++) {
    const time = draft.timeMs[i] as number;
    if (time < latest) reordered++;
    else latest = time;
  }
  const sorted = reordered > 0 ? pickFixes(draft, timeOrder(draft)) : draft;
  const mergedDraft = mergeInstants(evenWholeSeconds(sorted));
  return { draft: mergedDraft, reordered, merged: sorted.count - mergedDraft.count };
}

function timeOrder(draft: FixDraft): Uint32Array {
  const order = new Uint32Array(draft.count);
  for (let i = 0; i < draft.count; i++) order[i] = i;
  return order.sort((a, b) => (draft.timeMs[a] as number) - (draft.timeMs[b] as number) || a - b);
}

function mergeInstants(draft: FixDraft): FixDraft {
  const { count, timeMs, latDeg, lonDeg } = draft;
  const chosen: number[] = [];
  const lat = Float64Array.from(latDeg);
  const lon = Float64Array.from(lonDeg);
  for (let i = 0; i < count;) {
    const t0 = timeMs[i] as number;
    let n = 1;
    let j = i + 1;
    for (; j < count && (timeMs[j] as number) - t0 < SAME_TIME_MS; j++) {
      const apart = distanceM(lat[i] as number, lon[i] as number, latDeg[j] as number, lonDeg[j] as number);
      if (apart > SAME_PLACE_M) continue;
      n++;
      lat[i] = (lat[i] as number) + ((latDeg[j] as number) - (lat[i] as number)) / n;
      lon[i] = wrapLongitudeDeg(
        (lon[i] as number) + wrapLongitudeDeg((lonDeg[j] as number) - (lon[i] as number)) / n,
      );
    }
    chosen.push(i);
    i = j;
  }
  if (chosen.length === count) return draft;
  return pickFixes({ ...draft, latDeg: lat, lonDeg: lon }, chosen);
}
