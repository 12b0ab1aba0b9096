import { metresPerDegreeEast, metresPerDegreeNorth } from "@/lib/geo/ellipsoid";
import { seededRng, standardNormal } from "@/lib/numeric/rng";
import type { Fixes } from "@/lib/track/fixes";
import type { Stretch } from "@/lib/track/speed-series";
import { fixesOf } from "@/tests/support/made-track";

import { axisError, episodes, type Receiver } from "./receivers";
import { type Ride, TRUE_STEP_S } from "./ride";

export type Recording = { readonly fixes: Fixes; readonly dropouts: readonly Stretch[] };

/** Degrees of a path in metres, each step laid out at its own latitude, as lengths on the ellipsoid ask for. */
type Degrees = { readonly latDeg: Float64Array; readonly lonDeg: Float64Array };

export function degreesOf(ride: Ride, startLatDeg: number, startLonDeg: number): Degrees {
  const n = ride.eastM.length;
  const latDeg = new Float64Array(n).fill(startLatDeg);
  const lonDeg = new Float64Array(n).fill(startLonDeg);
  for (let i = 1; i < n; i++) {
    const lat = latDeg[i - 1] ?? 0;
    latDeg[i] = lat + ((ride.northM[i] ?? 0) - (ride.northM[i - 1] ?? 0)) / metresPerDegreeNorth(lat);
    lonDeg[i] =
      (lonDeg[i - 1] ?? 0) + ((ride.eastM[i] ?? 0) - (ride.eastM[i - 1] ?? 0)) / metresPerDegreeEast(lat);
  }
  return { latDeg, lonDeg };
}

/** Two equal first-order lags one after the other: what a receiver that filters heavily shows. */
function lagged(column: ArrayLike<number>, lagS: number): Float64Array {
  const keep = Math.exp(-TRUE_STEP_S / lagS);
  const out = new Float64Array(column.length);
  let a = column[0] ?? 0;
  let b = a;
  for (let i = 0; i < out.length; i++) {
    a = (column[i] ?? 0) + keep * (a - (column[i] ?? 0));
    b = a + keep * (b - a);
    out[i] = b;
  }
  return out;
}

const lagSOf = (receiver: Receiver): number => receiver.lagS ?? 0;

function errorFilter(lagS: number): (error: number, timeS: number) => number {
  let a = NaN;
  let b = NaN;
  let before = 0;
  return (error, timeS) => {
    const keep = lagS > 0 ? Math.exp(-(timeS - before) / lagS) : 0;
    before = timeS;
    a = Number.isNaN(a) ? error : error + keep * (a - error);
    b = Number.isNaN(b) ? a : a + keep * (b - a);
    return b;
  };
}

type Shown = {
  readonly latDeg: ArrayLike<number>;
  readonly lonDeg: ArrayLike<number>;
  readonly speed: ArrayLike<number>;
};

const within = (parts: readonly Stretch[], ms: number): Stretch | undefined =>
  parts.find((p) => ms >= p.startMs && ms <= p.endMs);

/** What the receiver writes of a ride. The same seed gives the same recording. */
export function record(
  ride: Ride,
  degrees: Degrees,
  receiver: Receiver,
  options: { readonly startMs: number; readonly seed: number },
): Recording {
  const rng = seededRng(options.seed);
  const { lagS } = receiver;
  const speed = receiver.speedSdMps === undefined ? null : lagged(ride.speedMps, 0.06);
  const shown: Shown = {
    latDeg: lagS ? lagged(degrees.latDeg, lagS) : degrees.latDeg,
    lonDeg: lagS ? lagged(degrees.lonDeg, lagS) : degrees.lonDeg,
    speed: speed ?? [],
  };
  const wholeS = (ride.eastM.length - 1) * TRUE_STEP_S;
  const bursts = receiver.bursts && {
    everyS: receiver.bursts.everyS,
    lastS: [3, 2 * receiver.bursts.lastS - 3] as const,
  };
  const spikes = receiver.spikesEveryS
    ? { everyS: receiver.spikesEveryS, lastS: [0.9, 1.9] as const }
    : undefined;
  const events = {
    dropouts: episodes(receiver.dropouts, wholeS, rng),
    stale: episodes(receiver.stale, wholeS, rng),
    bursts: episodes(bursts, wholeS, rng),
    spikes: episodes(spikes, wholeS, rng),
  };
  return writeFixes({ ride, shown, receiver, events, rng, startMs: options.startMs });
}

type Events = Readonly<Record<"dropouts" | "stale" | "bursts" | "spikes", readonly Stretch[]>>;

function writeFixes(of: {
  readonly ride: Ride;
  readonly shown: Shown;
  readonly receiver: Receiver;
  readonly events: Events;
  readonly rng: () => number;
  readonly startMs: number;
}): Recording {
  const { shown, receiver, events, rng } = of;
  const errors = [axisError(receiver, rng), axisError(receiver, rng)] as const;
  // A receiver that filters does so with its own errors, too.
  const filters = [errorFilter(lagSOf(receiver)), errorFilter(lagSOf(receiver))] as const;
  const columns = {
    timeMs: [] as number[],
    latDeg: [] as number[],
    lonDeg: [] as number[],
    speed: [] as number[],
  };
  const reflections = new Reflections(receiver, rng);
  const chooser = new Chooser(receiver.unevenS ?? 0);
  const wholeS = (of.ride.eastM.length - 1) * TRUE_STEP_S;
  const scale = 10 ** (receiver.decimals ?? 7);
  const phaseS = receiver.wholeSeconds ? 0.3 * rng() : 0;
  let kept = { lat: NaN, lon: NaN };
  for (let n = 0; phaseS + n * receiver.stepS <= wholeS; n++) {
    const nominalS = phaseS + n * receiver.stepS;
    const timeS = Math.min(wholeS, Math.max(0, nominalS + (receiver.jitterS ?? 0) * standardNormal(rng)));
    const i = Math.min(shown.latDeg.length - 1, Math.round(timeS / TRUE_STEP_S));
    const share = timeS / TRUE_STEP_S - i;
    const mix = (c: ArrayLike<number>) =>
      (c[i] ?? 0) + share * ((c[Math.min(c.length - 1, i + 1)] ?? 0) - (c[i] ?? 0));
    const burst = within(events.bursts, timeS * 1000);
    const off = reflections.at(timeS, burst ?? null);
    const spike = within(events.spikes, timeS * 1000) ? 60 : 0;
    const east = filters[0](errors[0](timeS), timeS) + off[0] + spike;
    const north = filters[1](errors[1](timeS), timeS) + off[1];
    if (within(events.dropouts, timeS * 1000) || rng() < (receiver.lostShare ?? 0)) continue;
    if (!chooser.takes(of.ride, timeS, n === 0)) continue;
    const lat = mix(shown.latDeg) + north / metresPerDegreeNorth(mix(shown.latDeg));
    const lon = mix(shown.lonDeg) + east / metresPerDegreeEast(lat);
    if (!within(events.stale, timeS * 1000)) kept = { lat, lon };
    const ms = of.startMs + timeS * 1000;
    columns.timeMs.push(receiver.wholeSeconds ? Math.floor(ms / 1000) * 1000 : Math.round(ms));
    columns.latDeg.push(Math.round(kept.lat * scale) / scale);
    columns.lonDeg.push(Math.round(kept.lon * scale) / scale);
    if (receiver.speedSdMps !== undefined)
      columns.speed.push(
        Math.max(0, Math.round(100 * (mix(shown.speed) + receiver.speedSdMps * standardNormal(rng))) / 100),
      );
  }
  const said = receiver.speedSdMps === undefined ? null : columns.speed;
  const fixes = fixesOf(columns.timeMs, columns.latDeg, columns.lonDeg, said);
  const shift = (p: Stretch) => ({ startMs: of.startMs + p.startMs, endMs: of.startMs + p.endMs });
  return { fixes, dropouts: [...events.dropouts, ...events.stale].map(shift) };
}

/** An offset that jumps up with each burst of reflections, wanders by a third of itself within seconds, and is gone at its end. */
class Reflections {
  private burst: Stretch | null = null;
  private base: [number, number] = [0, 0];

  constructor(
    private readonly receiver: Receiver,
    private readonly rng: () => number,
  ) {}

  at(timeS: number, burst: Stretch | null): readonly [number, number] {
    const of = this.receiver.bursts;
    if (!of || !burst) return [0, 0];
    const size = () => of.sizeM[0] + (of.sizeM[1] - of.sizeM[0]) * this.rng();
    if (burst !== this.burst) {
      const angle = 2 * Math.PI * this.rng();
      const length = size();
      this.base = [length * Math.sin(angle), length * Math.cos(angle)];
      this.burst = burst;
    }
    const loose = () => 1 + 0.33 * standardNormal(this.rng);
    // In and out within a second or two, as a receiver's own filter has it.
    const edge = Math.min(
      1,
      (timeS * 1000 - burst.startMs + 300) / 1500,
      (burst.endMs + 300 - timeS * 1000) / 1500,
    );
    return [this.base[0] * edge * loose(), this.base[1] * edge * loose()];
  }
}

/** Uneven recording: a fix when the way bent by a metre or two from the last ones, or so many seconds passed. */
class Chooser {
  private last = { timeS: -Infinity, heading: 0, speed: 0 };

  constructor(private readonly unevenS: number) {}

  takes(ride: Ride, timeS: number, first: boolean): boolean {
    if (this.unevenS === 0) return true;
    const i = Math.round(timeS / TRUE_STEP_S);
    const a = Math.max(0, i - 10);
    const east = (ride.eastM[i] ?? 0) - (ride.eastM[a] ?? 0);
    const north = (ride.northM[i] ?? 0) - (ride.northM[a] ?? 0);
    const now = { timeS, heading: Math.atan2(east, north), speed: ride.speedMps[i] ?? 0 };
    const turned = Math.abs(Math.sin((now.heading - this.last.heading) / 2)) > 0.1;
    const changed = Math.abs(now.speed - this.last.speed) > 0.9;
    if (!first && !turned && !changed && timeS - this.last.timeS < this.unevenS - 0.5) return false;
    this.last = now;
    return true;
  }
}
