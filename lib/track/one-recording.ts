import { sortedQuantile } from "@/lib/numeric/quantile";

import { type FixDraft, keepFixes } from "./fix-draft";

/** Segments of one recorder may touch; more than this in common is a second recorder. */
const COMMON_MS = 5000;

type Span = {
  readonly segment: number;
  readonly count: number;
  readonly fromMs: number;
  readonly toMs: number;
};

/**
 * The fixes of one recorder: where segments of a file run at the same time (two watches, two riders, a track written twice), the one with more
 * fixes stays and the other goes as a whole. Time ranges are taken from the 2nd to the 98th percentile of a segment's times, so that a
 * single wrong clock does not make it overlap the rest. `segmentStarts` are the raw ones. A draft of one segment is returned as it is.
 *
 * @example
 * oneRecording({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }, [0]).count; // 0
 */
export function oneRecording(draft: FixDraft, segmentStarts: ArrayLike<number>): FixDraft {
  if (segmentStarts.length < 2) return draft;
  const segmentOf = segmentOfFix(draft, segmentStarts);
  const spans = spansOf(draft, segmentOf).sort((a, b) => a.fromMs - b.fromMs || b.count - a.count);
  const dropped = new Set<number>();
  let current: Span | null = null;
  for (const span of spans) {
    const overlaps: boolean = current !== null && Math.min(current.toMs, span.toMs) - span.fromMs > COMMON_MS;
    if (current === null || !overlaps) {
      current = span;
    } else if (span.count > current.count) {
      dropped.add(current.segment);
      current = span;
    } else {
      dropped.add(span.segment);
    }
  }
  if (dropped.size === 0) return draft;
  return keepFixes(
    draft,
    Uint8Array.from(segmentOf, (segment) => (dropped.has(segment) ? 0 : 1)),
  );
}

function segmentOfFix(draft: FixDraft, segmentStarts: ArrayLike<number>): Uint32Array {
  const segmentOf = new Uint32Array(draft.count);
  let segment = 0;
  for (let i = 0; i < draft.count; i++) {
    const source = draft.source[i] as number;
    while (segment + 1 < segmentStarts.length && (segmentStarts[segment + 1] as number) <= source) segment++;
    segmentOf[i] = segment;
  }
  return segmentOf;
}

function spansOf(draft: FixDraft, segmentOf: Uint32Array): Span[] {
  const spans: Span[] = [];
  for (let from = 0; from < draft.count;) {
    let to = from;
    while (to < draft.count && segmentOf[to] === segmentOf[from]) to++;
    const times = draft.timeMs.slice(from, to).sort();
    spans.push({
      segment: segmentOf[from] as number,
      count: to - from,
      fromMs: sortedQuantile(times, 0.02),
      toMs: sortedQuantile(times, 0.98),
    });
    from = to;
  }
  return spans;
}
