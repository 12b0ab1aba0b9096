import { metresPerDegreeEast, metresPerDegreeNorth } from "@/lib/geo/ellipsoid";
import { at } from "@/lib/errors/invariant";
import { standardNormal, type Rng } from "@/lib/numeric/rng";
import type { Fixes } from "@/lib/track/fixes";
import { STEP_S, type Motion } from "./motion";

/** One axis of a receiver's error: slow and fast correlated parts and white noise, metres (1 sigma). */
class AxisError {
  private slow: number;
  private fast: number;

  constructor(
    private readonly scale: number,
    private readonly rng: Rng,
  ) {
    this.slow = 0.8 * scale * standardNormal(rng);
    this.fast = 0.3 * scale * standardNormal(rng);
  }

  next(stepS: number): number {
    const follow = (value: number, sigma: number, timeS: number) => {
      const keep = Math.exp(-stepS / timeS);
      return keep * value + sigma * Math.sqrt(1 - keep * keep) * standardNormal(this.rng);
    };
    this.slow = follow(this.slow, 0.8 * this.scale, 45);
    this.fast = follow(this.fast, 0.3 * this.scale, 3);
    return this.slow + this.fast + 0.1 * this.scale * standardNormal(this.rng);
  }
}

/** What a watch writes down of a motion once a second: seven decimals, some fixes missing, now and then a spike. */
export function record(
  motion: Motion,
  options: { startMs: number; noise: number; heartRate: boolean; rng: Rng },
): Fixes {
  const { startMs, noise, heartRate, rng } = options;
  const every = Math.round(1 / STEP_S);
  const north = new AxisError(noise, rng);
  const east = new AxisError(noise, rng);
  const rows: [number, number, number, number][] = [];
  for (let i = 0; i < motion.timeS.length; i += every) {
    const spike = rng() < 0.0008 ? 30 * standardNormal(rng) : 0;
    const { latDeg, lonDeg } = at(motion.position, i);
    const lat = latDeg + (north.next(1) + spike) / metresPerDegreeNorth(latDeg);
    const lon = lonDeg + (east.next(1) + spike) / metresPerDegreeEast(latDeg);
    const lost = rng() < 0.004;
    if (!lost) {
      const timeMs = startMs + Math.round(at(motion.timeS, i)) * 1000;
      rows.push([timeMs, Number(lat.toFixed(7)), Number(lon.toFixed(7)), at(motion.heartRateBpm, i)]);
    }
  }
  const column = (index: 0 | 1 | 2 | 3) => Float64Array.from(rows, (row) => row[index]);
  return {
    count: rows.length,
    timeMs: column(0),
    latDeg: column(1),
    lonDeg: column(2),
    elevationM: null,
    heartRateBpm: heartRate ? column(3) : null,
    receiverSpeedMps: null,
    hdop: null,
    satellites: null,
    segmentStarts: rows.length === 0 ? new Uint32Array(0) : Uint32Array.of(0),
  };
}
