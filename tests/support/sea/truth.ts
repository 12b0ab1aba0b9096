import type { Stretch } from "@/lib/track/speed-series";
import { METRES_PER_NM } from "@/lib/units/length";

import { type Ended, type Ride, TRUE_STEP_S } from "./ride";

export type TrueFlight = Stretch & {
  readonly distanceM: number;
  readonly endedBy: Ended;
  /** Under 4 s: neither demanded nor punished. */
  readonly short: boolean;
};

export type TrueSurge = {
  readonly peakMs: number;
  readonly topFromMs: number;
  readonly topToMs: number;
  readonly peakMps: number;
  readonly sizeMps: number;
  /** The flight ended before the speed had fallen. */
  readonly open: boolean;
};

export type TrueBests = {
  readonly s2: number | null;
  readonly s10: number | null;
  readonly m500: number | null;
  readonly nm: number | null;
};

/** What truly happened on a made session. Times are UTC ms, speeds m/s. */
export type Truth = {
  readonly flights: readonly TrueFlight[];
  readonly surges: readonly TrueSurge[];
  readonly turns: readonly {
    readonly timeMs: number;
    readonly kind: "tack" | "gybe";
    readonly keptFoil: boolean;
  }[];
  readonly waterSessions: readonly Stretch[];
  readonly waterDistanceM: number;
  readonly onFoilDistanceM: number;
  readonly onFoilTimeS: number;
  readonly bests: TrueBests;
  readonly windFromDeg: number;
};

const SHORT_FLIGHT_S = 4;

/** Works the truth out from a ride that is written; `startMs` is the time of its first sample. */
export function truthOf(ride: Ride, startMs: number): Truth {
  const way = cumulated(ride);
  const at = (i: number) => startMs + i * TRUE_STEP_S * 1000;
  const wayAt = (i: number) => way[i] ?? 0;
  const flights = ride.flights.map((flight) => ({
    startMs: at(flight.from),
    endMs: at(flight.to),
    distanceM: wayAt(flight.to) - wayAt(flight.from),
    endedBy: flight.endedBy,
    short: (flight.to - flight.from) * TRUE_STEP_S < SHORT_FLIGHT_S,
  }));
  const onFoil = new Uint8Array(way.length);
  for (const flight of ride.flights) onFoil.fill(1, flight.from, flight.to + 1);
  const net = (i: number) => ride.netWayM[i] ?? 0;
  const water = ride.water.reduce((sum, w) => sum + net(w.to) - net(w.from), 0);
  const windFromDeg = (((((ride.sea.towardsRad + Math.PI) * 180) / Math.PI) % 360) + 360) % 360;
  return {
    flights,
    surges: ride.flights.flatMap((flight) => surgesOf(ride.speedMps, flight, at)),
    turns: ride.turns.map((turn) => ({ timeMs: at(turn.index), kind: turn.kind, keptFoil: turn.keptFoil })),
    waterSessions: ride.water.map((w) => ({ startMs: at(w.from), endMs: at(w.to) })),
    waterDistanceM: water,
    onFoilDistanceM: flights.reduce((sum, f) => sum + f.distanceM, 0),
    onFoilTimeS: flights.reduce((sum, f) => sum + (f.endMs - f.startMs) / 1000, 0),
    bests: {
      s2: bestOverTime(way, ride.water, 2),
      s10: bestOverTime(way, ride.water, 10),
      m500: bestOverDistance(way, ride.water, 500),
      nm: bestOverDistance(way, ride.water, METRES_PER_NM),
    },
    windFromDeg,
  };
}

function cumulated(ride: Ride): Float64Array {
  const way = new Float64Array(ride.speedMps.length);
  for (let i = 1; i < way.length; i++) way[i] = (way[i - 1] ?? 0) + (ride.speedMps[i] ?? 0) * TRUE_STEP_S;
  return way;
}

type Part = { readonly from: number; readonly to: number };

function bestOverTime(way: Float64Array, parts: readonly Part[], timeS: number): number | null {
  const width = Math.round(timeS / TRUE_STEP_S);
  let best = -1;
  for (const part of parts)
    for (let i = part.from; i + width <= part.to; i++)
      best = Math.max(best, (way[i + width] ?? 0) - (way[i] ?? 0));
  return best < 0 ? null : best / timeS;
}

function bestOverDistance(way: Float64Array, parts: readonly Part[], lengthM: number): number | null {
  let best = Infinity;
  for (const part of parts) {
    let j = part.from;
    for (let i = part.from; i <= part.to; i++) {
      while (j <= part.to && (way[j] ?? 0) - (way[i] ?? 0) < lengthM) j++;
      if (j > part.to) break;
      const over = (way[j] ?? 0) - (way[i] ?? 0) - lengthM;
      const last = (way[j] ?? 0) - (way[j - 1] ?? 0);
      best = Math.min(best, j - i - (last > 0 ? over / last : 0));
    }
  }
  return best < Infinity ? lengthM / (best * TRUE_STEP_S) : null;
}

const SURGE_MPS = 0.3;

/** Peaks of one flight with their rise (from the lowest point since a higher peak or the take-off) and fall. */
function surgesOf(speed: readonly number[], flight: Part, at: (i: number) => number): TrueSurge[] {
  const found: TrueSurge[] = [];
  const v = (i: number) => speed[i] ?? 0;
  for (let i = flight.from + 1; i < flight.to; i++) {
    if (!(v(i) > v(i - 1) && v(i) >= v(i + 1))) continue;
    let low = v(i);
    for (let k = i - 1; k >= flight.from && v(k) <= v(i); k--) low = Math.min(low, v(k));
    let after = i;
    let k = i + 1;
    for (; k <= flight.to && v(k) < v(i); k++) if (v(k) < v(after)) after = k;
    const sizeMps = Math.min(v(i) - low, v(i) - v(after));
    if (sizeMps < SURGE_MPS) continue;
    const near = v(i) - Math.max(0.1, 0.2 * sizeMps);
    let from = i;
    let to = i;
    while (from > flight.from && v(from - 1) >= near) from--;
    while (to < flight.to && v(to + 1) >= near) to++;
    const open = k > flight.to && after >= flight.to - 2 / TRUE_STEP_S;
    found.push({ peakMs: at(i), topFromMs: at(from), topToMs: at(to), peakMps: v(i), sizeMps, open });
  }
  return found;
}
