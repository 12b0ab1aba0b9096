import { GRAVITY, type Sea, seaAt, type SeaHere } from "./waves";

/** The true path is kept at 20 Hz. */
export const TRUE_STEP_S = 0.05;

export type Foil = { readonly stallMps: number; readonly bestGlide: number; readonly bestGlideMps: number };

/** Lift over drag at a speed: a parabolic polar, best at one speed. Source: Anderson 2016, Aircraft Performance and Design, 5.4. */
export function glideRatioAt(foil: Foil, speedMps: number): number {
  const r = Math.max(speedMps, 1) / foil.bestGlideMps;
  return (foil.bestGlide * 2) / (r * r + 1 / (r * r));
}

export type Ended = "stall" | "fall" | "landing";
export type Flight = { readonly from: number; to: number; endedBy: Ended };
export type TrueTurn = { readonly index: number; readonly kind: "tack" | "gybe"; keptFoil: boolean };

const angleTo = (from: number, to: number): number => Math.atan2(Math.sin(to - from), Math.cos(to - from));

/**
 * A ride while it is written, one sample every 0.05 s: where the rider truly is, the way without the waves'
 * to-and-fro, and what was going on. Metres east and north of a beach; angles in radians clockwise from north.
 */
export class Ride {
  readonly eastM: number[] = [0];
  readonly northM: number[] = [0];
  readonly speedMps: number[] = [0];
  readonly netWayM: number[] = [0];
  readonly flights: Flight[] = [];
  readonly turns: TrueTurn[] = [];
  readonly water: { from: number; to: number }[] = [];
  speed = 0;
  heading: number;
  private readonly here: SeaHere = { slopeEast: 0, slopeNorth: 0, orbitEast: 0, orbitNorth: 0 };

  constructor(
    readonly sea: Sea,
    readonly foil: Foil,
    readonly rng: () => number,
  ) {
    this.heading = sea.towardsRad;
  }

  get index(): number {
    return this.eastM.length - 1;
  }

  get timeS(): number {
    return this.index * TRUE_STEP_S;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.rng();
  }

  enterWater(): void {
    this.water.push({ from: this.index, to: this.index });
  }

  leaveWater(): void {
    const last = this.water.at(-1);
    if (last) last.to = this.index;
  }

  /** Slope of the sea along the heading, also refreshing what `float` needs. */
  slopeAhead(): number {
    const i = this.index;
    seaAt(this.sea, [this.eastM[i] ?? 0, this.northM[i] ?? 0], this.timeS, this.here);
    return this.here.slopeEast * Math.sin(this.heading) + this.here.slopeNorth * Math.cos(this.heading);
  }

  /** One step at the present speed and heading; `orbit` is how much of the waves' orbital motion carries the rider. */
  step(orbit: number): void {
    if (orbit > 0) this.slopeAhead();
    const east = this.speed * Math.sin(this.heading) + orbit * this.here.orbitEast;
    const north = this.speed * Math.cos(this.heading) + orbit * this.here.orbitNorth;
    const i = this.index;
    this.eastM.push((this.eastM[i] ?? 0) + east * TRUE_STEP_S);
    this.northM.push((this.northM[i] ?? 0) + north * TRUE_STEP_S);
    this.speedMps.push(Math.hypot(east, north));
    this.netWayM.push((this.netWayM[i] ?? 0) + this.speed * TRUE_STEP_S);
  }

  /** Off the foil: the speed drawn to a target within a time constant, the heading with it. */
  drift(seconds: number, to: { speed: number; heading?: number; timeS?: number; orbit?: number }): void {
    const end = this.timeS + seconds;
    const keep = Math.exp(-TRUE_STEP_S / (to.timeS ?? 1.5));
    while (this.timeS < end) {
      this.speed = to.speed + keep * (this.speed - to.speed);
      if (to.heading !== undefined) this.turnTowards(to.heading, 0.5);
      this.step(to.orbit ?? 1);
    }
  }

  turnTowards(heading: number, rateRadS: number): void {
    const off = angleTo(this.heading, heading);
    this.heading += Math.max(-rateRadS * TRUE_STEP_S, Math.min(rateRadS * TRUE_STEP_S, off));
  }

  /** A start from the water: effort until the board lifts at 1.13 times stall. */
  takeOff(heading: number): void {
    const push = this.between(0.55, 1.1);
    while (this.speed < 1.13 * this.foil.stallMps) {
      const hull = 0.25 * Math.exp(-(((this.speed - 2.2) / 0.8) ** 2));
      const wave = 0.5 * -GRAVITY * this.slopeAhead();
      const gain = Math.max(-0.3, Math.min(1.6, push - hull + wave));
      this.speed = Math.max(0.4, this.speed + gain * TRUE_STEP_S);
      this.turnTowards(heading, 0.3);
      this.step(this.speed < 2.5 ? 0.6 : 0.2);
    }
    this.flights.push({ from: this.index, to: this.index, endedBy: "stall" });
  }

  /** One step on the foil under a push (m/s2): the waves' slope, the foil's drag. False when the foil stalls. */
  flyStep(pushMps2: number): boolean {
    const drag = GRAVITY / glideRatioAt(this.foil, this.speed);
    const wave = -GRAVITY * this.slopeAhead();
    this.speed += (pushMps2 + wave - drag) * TRUE_STEP_S;
    this.step(0);
    return this.speed > this.foil.stallMps;
  }

  touchDown(endedBy: Ended): void {
    const flight = this.flights.at(-1);
    if (flight) {
      flight.to = this.index;
      flight.endedBy = endedBy;
    }
    if (endedBy === "fall")
      this.drift(this.between(1.5, 3), { speed: 0.2, timeS: this.between(0.4, 0.8), orbit: 0.3 });
    else this.drift(this.between(2, 4), { speed: 1.2, timeS: this.between(1.2, 2.2), orbit: 0.3 });
  }
}
