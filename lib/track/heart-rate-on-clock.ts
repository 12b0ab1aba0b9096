import type { Fixes } from "./fixes";
import type { UniformClock } from "./uniform-clock";

/** Straps and watches report every few seconds; over a longer silence nothing is known. */
const SILENCE_MS = 15_000;

/**
 * Heart rate on a uniform clock, beats per minute: linear between the fixes that have one, NaN where they are more than 15 s apart and outside
 * them. Null when the file has none. Times of the fixes rise.
 *
 * @example
 * heartRateOnClock({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: new Uint32Array(0) }, { startMs: 0, stepMs: 250, count: 0 }); // null
 */
export function heartRateOnClock(fixes: Fixes, clock: UniformClock): Float32Array | null {
  const said = fixes.heartRateBpm;
  if (said === null) return null;
  const out = new Float32Array(clock.count).fill(NaN);
  let last = -1;
  for (let i = 0; i < fixes.count; i++) {
    const bpm = said[i] as number;
    if (!(bpm > 0)) continue;
    const t1 = fixes.timeMs[i] as number;
    const t0 = last >= 0 ? (fixes.timeMs[last] as number) : t1;
    const before = last >= 0 ? (said[last] as number) : bpm;
    last = i;
    if (t1 - t0 > SILENCE_MS) continue;
    const to = Math.min(clock.count - 1, Math.floor((t1 - clock.startMs) / clock.stepMs));
    for (let k = Math.max(0, Math.ceil((t0 - clock.startMs) / clock.stepMs)); k <= to; k++) {
      const share = t1 > t0 ? (clock.startMs + k * clock.stepMs - t0) / (t1 - t0) : 0;
      out[k] = before + share * (bpm - before);
    }
  }
  return out;
}
