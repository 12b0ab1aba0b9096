import { standardNormal } from "@/lib/numeric/rng";

/** Standard gravity (m/s2), exact by definition. Source: CGPM 1901, resolution 2. */
export const GRAVITY = 9.80665;

/** One regular wave: amplitude (m), wave number (1/m) by east and north, angular frequency (1/s), phase. */
type Component = {
  readonly amplitudeM: number;
  readonly kEast: number;
  readonly kNorth: number;
  readonly k: number;
  readonly omega: number;
  readonly phase: number;
  readonly orbit: number;
};

export type Sea = { readonly components: readonly Component[]; readonly towardsRad: number };

/**
 * Wave number by Newton's rule on omega^2 = g k tanh(k h), from the deep-water value.
 * Source: Airy 1845; e.g. Dean and Dalrymple 1991, eq. 3.34.
 */
export function waveNumber(periodS: number, depthM: number): number {
  const omega = (2 * Math.PI) / periodS;
  const deep = omega ** 2 / GRAVITY;
  let k = deep / Math.sqrt(Math.tanh(deep * depthM));
  for (let i = 0; i < 20; i++) {
    const th = Math.tanh(k * depthM);
    const f = GRAVITY * k * th - omega ** 2;
    k -= f / (GRAVITY * th + GRAVITY * k * depthM * (1 - th * th));
  }
  return k;
}

export type SeaState = {
  readonly heightM: number;
  readonly periodS: number;
  readonly depthM: number;
  /** Where the waves run to, radians clockwise from north. */
  readonly towardsRad: number;
  readonly swellHeightM: number;
  readonly swellPeriodS: number;
};

/** A random sea: a wind sea of 14 waves around its peak, spread by some 18 degrees, and a swell of 3. Heights are significant ones. */
export function makeSea(state: SeaState, rng: () => number): Sea {
  const components: Component[] = [];
  const add = (count: number, heightM: number, periodS: number, widths: readonly [number, number]) => {
    const weights = Array.from({ length: count }, (_, i) => {
      const ratio = count === 1 ? 1 : 0.75 + (0.75 * i) / (count - 1);
      // Pierson and Moskowitz 1964: energy over frequency relative to the peak.
      return { ratio, energy: ratio ** -5 * Math.exp(-1.25 * ratio ** -4) };
    });
    const whole = weights.reduce((sum, w) => sum + w.energy, 0);
    for (const { ratio, energy } of weights) {
      const period = periodS / (1 + widths[0] * (ratio - 1));
      const k = waveNumber(period, state.depthM);
      const towards = state.towardsRad + widths[1] * standardNormal(rng);
      const amplitudeM = Math.sqrt((2 * (heightM / 4) ** 2 * energy) / whole);
      components.push({
        amplitudeM,
        kEast: k * Math.sin(towards),
        kNorth: k * Math.cos(towards),
        k,
        omega: (2 * Math.PI) / period,
        phase: 2 * Math.PI * rng(),
        orbit: 1 / Math.tanh(k * state.depthM),
      });
    }
  };
  add(14, state.heightM, state.periodS, [1, 0.3]);
  add(3, state.swellHeightM, state.swellPeriodS, [0.2, 0.1]);
  return { components, towardsRad: state.towardsRad };
}

/** What the sea does at a place and time: slope and orbital velocity at the surface, both by east and north. */
export type SeaHere = { slopeEast: number; slopeNorth: number; orbitEast: number; orbitNorth: number };

/** Fills `here`: the surface is the sum of a cos(k x - omega t + phase). */
export function seaAt(sea: Sea, place: readonly [number, number], timeS: number, here: SeaHere): void {
  here.slopeEast = here.slopeNorth = here.orbitEast = here.orbitNorth = 0;
  for (const c of sea.components) {
    const angle = c.kEast * place[0] + c.kNorth * place[1] - c.omega * timeS + c.phase;
    const sin = -c.amplitudeM * Math.sin(angle);
    const cos = (c.amplitudeM * c.omega * c.orbit * Math.cos(angle)) / c.k;
    here.slopeEast += c.kEast * sin;
    here.slopeNorth += c.kNorth * sin;
    here.orbitEast += c.kEast * cos;
    here.orbitNorth += c.kNorth * cos;
  }
}
