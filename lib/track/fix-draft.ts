import type { Fixes } from "@/lib/track/fixes";

/** Fixes on their way through the cleaning: times, places, and which raw fix each one is. */
export type FixDraft = {
  readonly count: number;
  readonly timeMs: Float64Array;
  readonly latDeg: Float64Array;
  readonly lonDeg: Float64Array;
  /** Index of the raw fix that lends its other quantities (heart rate, elevation ...). */
  readonly source: Uint32Array;
};

/**
 * The fixes of a draft for which `keep` is not 0, in the same order. `keep` has one element a fix.
 *
 * @example
 * keepFixes({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }, new Uint8Array(0)).count; // 0
 */
export function keepFixes(draft: FixDraft, keep: Uint8Array): FixDraft {
  const chosen = new Uint32Array(draft.count);
  let count = 0;
  for (let i = 0; i < draft.count; i++) if (keep[i]) chosen[count++] = i;
  if (count === draft.count) return draft;
  return pickFixes(draft, chosen.subarray(0, count));
}

/**
 * The fixes of a draft at the given indices, in that order.
 *
 * @example
 * pickFixes({ count: 1, timeMs: Float64Array.of(5), latDeg: Float64Array.of(1), lonDeg: Float64Array.of(2), source: Uint32Array.of(0) }, [0]).timeMs[0]; // 5
 */
export function pickFixes(draft: FixDraft, indices: ArrayLike<number>): FixDraft {
  const count = indices.length;
  const timeMs = new Float64Array(count);
  const latDeg = new Float64Array(count);
  const lonDeg = new Float64Array(count);
  const source = new Uint32Array(count);
  for (let k = 0; k < count; k++) {
    const i = indices[k] as number;
    timeMs[k] = draft.timeMs[i] as number;
    latDeg[k] = draft.latDeg[i] as number;
    lonDeg[k] = draft.lonDeg[i] as number;
    source[k] = draft.source[i] as number;
  }
  return { count, timeMs, latDeg, lonDeg, source };
}

/**
 * Cleaned fixes from a draft: the other quantities are those of the raw fixes, and a segment starts wherever the
 * raw segment changes between two neighbours.
 *
 * @example
 * draftToFixes({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }, { count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: new Uint32Array(0) }).count; // 0
 */
export function draftToFixes(draft: FixDraft, raw: Fixes): Fixes {
  const gather = (column: Float64Array | null) =>
    column === null ? null : Float64Array.from(draft.source, (i) => column[i] as number);
  const segmentOf = new Uint32Array(raw.count);
  let segment = 0;
  for (let i = 0; i < raw.count; i++) {
    while (segment + 1 < raw.segmentStarts.length && (raw.segmentStarts[segment + 1] as number) <= i)
      segment++;
    segmentOf[i] = segment;
  }
  const starts: number[] = [];
  for (let k = 0; k < draft.count; k++) {
    const here = segmentOf[draft.source[k] as number];
    if (k === 0 || here !== segmentOf[draft.source[k - 1] as number]) starts.push(k);
  }
  return {
    count: draft.count,
    timeMs: draft.timeMs,
    latDeg: draft.latDeg,
    lonDeg: draft.lonDeg,
    elevationM: gather(raw.elevationM),
    heartRateBpm: gather(raw.heartRateBpm),
    receiverSpeedMps: gather(raw.receiverSpeedMps),
    hdop: gather(raw.hdop),
    satellites: gather(raw.satellites),
    segmentStarts: Uint32Array.from(starts),
  };
}
