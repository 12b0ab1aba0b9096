import { median, quantile } from "@/lib/numeric/quantile";

import type { Fixes } from "./fixes";

const MINUTE_MS = 60_000;
const MINUTES_MIN = 8;
const VALUES_MIN = 4;

/**
 * Range of height over a track, metres: from the 10th to the 90th percentile of the medians of each minute in which the track moved at `leastMps` or
 * more (a slow watch may be under water, where a barometer shows nonsense). Open water is level, so some tens of metres mean land; satellite heights wander by ten or twenty. `speedAt` gives the smoothed speed at a
 * time. NaN when the file has no heights or fewer than eight such minutes.
 *
 * @example
 * heightRangeM({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: new Uint32Array(0) }, () => 0, 2); // NaN
 */
export function heightRangeM(fixes: Fixes, speedAt: (timeMs: number) => number, leastMps: number): number {
  if (fixes.elevationM === null) return NaN;
  const medians: number[] = [];
  let values: number[] = [];
  let minute = NaN;
  for (let i = 0; i <= fixes.count; i++) {
    const time = fixes.timeMs[i] ?? NaN;
    const here = Math.floor(time / MINUTE_MS);
    if (here !== minute) {
      if (values.length >= VALUES_MIN) medians.push(median(values));
      values = [];
      minute = here;
    }
    const height = fixes.elevationM[i] ?? NaN;
    if (Number.isFinite(height) && speedAt(time) >= leastMps) values.push(height);
  }
  if (medians.length < MINUTES_MIN) return NaN;
  return quantile(medians, 0.9) - quantile(medians, 0.1);
}
