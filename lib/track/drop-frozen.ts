import { distanceM } from "@/lib/geo/distance-m";

import { type FixDraft, keepFixes } from "./fix-draft";

/** A catch-up jump shorter than this may be the rounding of a file with five decimals (1.1 m) at a run of equal places. */
const CATCH_UP_M = 3.5;
/** Slower than this over the whole freeze the receiver was rightly holding still. */
const CATCH_UP_MPS = 0.45;

/**
 * Step 3a of the cleaning: a receiver that lost the sky repeats its last place and then jumps to where the rider went meanwhile. Of a run of
 * exactly equal places that ends in such a jump only the first fix stays, so that a gap is left instead of a rest and a leap.
 * Runs without a jump (rest, rounding) stay as they are.
 *
 * @example
 * dropFrozen({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }).count; // 0
 */
export function dropFrozen(draft: FixDraft): FixDraft {
  const { count, timeMs, latDeg, lonDeg } = draft;
  const keep = new Uint8Array(count).fill(1);
  for (let i = 0; i < count;) {
    const lat = latDeg[i] as number;
    const lon = lonDeg[i] as number;
    let end = i;
    while (end + 1 < count && latDeg[end + 1] === lat && lonDeg[end + 1] === lon) end++;
    if (end > i && end + 1 < count) {
      const jumpM = distanceM(lat, lon, latDeg[end + 1] as number, lonDeg[end + 1] as number);
      const wholeS = ((timeMs[end + 1] as number) - (timeMs[i] as number)) / 1000;
      if (jumpM > CATCH_UP_M && jumpM / wholeS > CATCH_UP_MPS) keep.fill(0, i + 1, end + 1);
    }
    i = end + 1;
  }
  return keepFixes(draft, keep);
}
