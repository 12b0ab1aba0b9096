import type { Fixes } from "@/lib/track/fixes";

import { type FixDraft, keepFixes } from "./fix-draft";

/** Satellite navigation time begins on 6 January 1980 (IS-GPS-200, 3.3.4): an earlier time is the receiver's clock before its first fix. */
const FIRST_BELIEVABLE_MS = 315_964_800_000;
const DAY_MS = 86_400_000;
/** A longer span is not one outing; it bounds the memory of the uniform clock. */
export const SPAN_LIMIT_MS = 14 * DAY_MS;

/**
 * Step 1 of the cleaning: the fixes whose values can be true. Dropped are places that are not finite, out of range or exactly
 * 0, 0 (a receiver without a fix), and times that are not finite or before satellite navigation began.
 *
 * @example
 * believableFixes({ count: 1, timeMs: Float64Array.of(0), latDeg: Float64Array.of(1), lonDeg: Float64Array.of(2), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: Uint32Array.of(0) }).count; // 0
 */
export function believableFixes(raw: Fixes): FixDraft {
  const keep = new Uint8Array(raw.count);
  const source = new Uint32Array(raw.count);
  for (let i = 0; i < raw.count; i++) {
    const time = raw.timeMs[i] as number;
    const lat = raw.latDeg[i] as number;
    const lon = raw.lonDeg[i] as number;
    source[i] = i;
    const placed = Math.abs(lat) <= 90 && Math.abs(lon) <= 180 && (lat !== 0 || lon !== 0);
    if (placed && time >= FIRST_BELIEVABLE_MS && time < Infinity) keep[i] = 1;
  }
  const all = { count: raw.count, timeMs: raw.timeMs, latDeg: raw.latDeg, lonDeg: raw.lonDeg, source };
  return keepFixes(all, keep);
}

/**
 * The part of a track in time order that is one outing. Fixes that stand alone (fewer than 10, less than 1 % of the track, a day
 * or more from the rest) have a wrong clock and go. If what is left spans more than 14 days, the 14 days with most fixes stay.
 *
 * @example
 * oneOuting({ count: 1, timeMs: Float64Array.of(1e12), latDeg: Float64Array.of(1), lonDeg: Float64Array.of(2), source: Uint32Array.of(0) }).count; // 1
 */
export function oneOuting(draft: FixDraft): FixDraft {
  const { count, timeMs } = draft;
  const keep = new Uint8Array(count).fill(1);
  let from = 0;
  for (let i = 1; i <= count; i++) {
    const closes = i === count || (timeMs[i] as number) - (timeMs[i - 1] as number) > DAY_MS;
    if (!closes) continue;
    const size = i - from;
    if (size < 10 && size < 0.01 * count) keep.fill(0, from, i);
    from = i;
  }
  const rest = keepFixes(draft, keep);
  const first = rest.timeMs[0] ?? 0;
  const last = rest.timeMs[rest.count - 1] ?? 0;
  return last - first <= SPAN_LIMIT_MS ? rest : fullestSpan(rest);
}

function fullestSpan(draft: FixDraft): FixDraft {
  let best = { from: 0, to: 0 };
  let from = 0;
  for (let to = 0; to < draft.count; to++) {
    while ((draft.timeMs[to] as number) - (draft.timeMs[from] as number) > SPAN_LIMIT_MS) from++;
    if (to - from > best.to - best.from) best = { from, to };
  }
  const keep = new Uint8Array(draft.count);
  keep.fill(1, best.from, best.to + 1);
  return keepFixes(draft, keep);
}
