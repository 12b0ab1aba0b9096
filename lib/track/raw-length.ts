import { distanceM } from "@/lib/geo/distance-m";

import type { Fixes } from "./fixes";

/**
 * Length of the track as it was recorded, metres: the sum of the steps on the ellipsoid between neighbouring fixes inside
 * segments, in the order of the file, before any cleaning. Fixes whose place is not finite or out of range are passed over. 0 for fewer than two
 * fixes. It is for comparison with other tools, not a figure of the session: noise makes it too long.
 *
 * @example
 * rawLengthM({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: new Uint32Array(0) }); // 0
 */
export function rawLengthM(fixes: Fixes): number {
  let sum = 0;
  let segment = 0;
  let last = -1;
  for (let i = 0; i < fixes.count; i++) {
    if (i === fixes.segmentStarts[segment]) {
      segment++;
      last = -1;
    }
    const lat = fixes.latDeg[i] as number;
    const lon = fixes.lonDeg[i] as number;
    if (!(Math.abs(lat) <= 90 && Math.abs(lon) <= 180)) continue;
    if (last >= 0) sum += distanceM(fixes.latDeg[last] as number, fixes.lonDeg[last] as number, lat, lon);
    last = i;
  }
  return sum;
}
