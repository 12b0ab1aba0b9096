import { standardNormal } from "@/lib/numeric/rng";
import type { Stretch } from "@/lib/track/speed-series";

/** A first-order correlated error of one axis: standard deviation (m) and correlation time (s). */
export type Wander = { readonly sdM: number; readonly timeS: number };

/**
 * What a receiver makes of the truth. Every part is optional but the step: errors by axis, white noise, bursts of reflections, a filter
 * of two equal lags (s each), lost fixes, stale repeats, spikes, rounding, and a speed of its own (error sd, m/s).
 */
export type Receiver = {
  readonly name: string;
  readonly stepS: number;
  readonly wander: readonly Wander[];
  readonly whiteM: number;
  readonly bursts?: {
    readonly everyS: number;
    readonly lastS: number;
    readonly sizeM: readonly [number, number];
  };
  readonly lagS?: number;
  /** Records a fix only when the course or the speed changed or so many seconds passed. */
  readonly unevenS?: number;
  readonly lostShare?: number;
  readonly stale?: { readonly everyS: number; readonly lastS: readonly [number, number] };
  readonly dropouts?: { readonly everyS: number; readonly lastS: readonly [number, number] };
  readonly spikesEveryS?: number;
  readonly decimals?: number;
  readonly wholeSeconds?: boolean;
  readonly jitterS?: number;
  readonly speedSdMps?: number;
};

const wander = (slow: number, fast: number): Wander[] => [
  { sdM: slow, timeS: 45 },
  { sdM: fast, timeS: 3 },
];
const usual = { dropouts: { everyS: 600, lastS: [3, 9] as const }, spikesEveryS: 900 };
const low = { wander: wander(0.8, 0.3), whiteM: 0.1 };
const mid = { wander: wander(1.7, 0.6), whiteM: 0.2 };
const high = { wander: wander(3.4, 1.3), whiteM: 0.6 };

/** Receivers of several makes of error, none of them that of a named product. */
export const RECEIVERS: readonly Receiver[] = [
  { name: "low", stepS: 1, ...low, ...usual },
  { name: "mid", stepS: 1, ...mid, ...usual },
  { name: "high", stepS: 1, ...high, ...usual },
  { name: "uneven", stepS: 1, unevenS: 6, ...mid, ...usual },
  { name: "5 Hz", stepS: 0.2, ...mid, ...usual },
  { name: "10 Hz", stepS: 0.1, ...low },
  { name: "bursts", stepS: 1, ...low, bursts: { everyS: 150, lastS: 8, sizeM: [5, 15] } },
  { name: "coarse", stepS: 1.003, ...low, decimals: 5, wholeSeconds: true, jitterS: 0.03 },
  { name: "coarse 10 Hz", stepS: 0.1, ...low, decimals: 5 },
  { name: "lagging", stepS: 1, wander: wander(1, 0.3), whiteM: 0.1, lagS: 1.5 },
  { name: "white", stepS: 1, wander: [{ sdM: 0.6, timeS: 45 }], whiteM: 1.6 },
  {
    name: "phone",
    stepS: 1,
    ...mid,
    jitterS: 0.05,
    lostShare: 0.12,
    stale: { everyS: 90, lastS: [2, 5] },
    dropouts: { everyS: 400, lastS: [4, 15] },
  },
  { name: "doppler", stepS: 1, ...high, speedSdMps: 0.1, ...usual },
  { name: "doppler low", stepS: 1, ...low, speedSdMps: 0.1 },
];

/** One axis of a receiver's error, asked for at rising times. */
export function axisError(receiver: Receiver, rng: () => number): (timeS: number) => number {
  const values = receiver.wander.map((w) => w.sdM * standardNormal(rng));
  let before = 0;
  return (timeS) => {
    const dt = timeS - before;
    before = timeS;
    let sum = 0;
    receiver.wander.forEach((w, i) => {
      const keep = Math.exp(-dt / w.timeS);
      values[i] = keep * (values[i] ?? 0) + w.sdM * Math.sqrt(1 - keep * keep) * standardNormal(rng);
      sum += values[i] ?? 0;
    });
    return sum + receiver.whiteM * standardNormal(rng);
  };
}

/** Times at which something lasts for a while: on average every so many seconds, for between two lengths. */
export function episodes(
  of: { readonly everyS: number; readonly lastS: readonly [number, number] } | undefined,
  wholeS: number,
  rng: () => number,
): Stretch[] {
  const found: Stretch[] = [];
  if (!of) return found;
  for (let t = -of.everyS * Math.log(1 - rng()); t < wholeS; t += -of.everyS * Math.log(1 - rng())) {
    const length = of.lastS[0] + (of.lastS[1] - of.lastS[0]) * rng();
    found.push({ startMs: t * 1000, endMs: (t + length) * 1000 });
    t += length;
  }
  return found;
}
