import { metresPerDegreeEast, metresPerDegreeNorth } from "@/lib/geo/ellipsoid";
import { standardNormal, type Rng } from "@/lib/numeric/rng";

/** Internal step of the model, seconds. */
export const STEP_S = 0.2;

export type Position = { readonly latDeg: number; readonly lonDeg: number };

/** How a rider on a given setup moves in the wind of the day; speeds m/s. */
export type Form = {
  /** Middle of the speed on foil. */
  readonly cruiseMps: number;
  /** Typical gain from lull to peak. */
  readonly surgeMps: number;
  /** Mean time between falls on foil, seconds. */
  readonly steadinessS: number;
  readonly takeoffMps: number;
};

/** The true motion of a session, a row a step: time since start, position, speed, heart rate. */
export type Motion = {
  readonly timeS: number[];
  readonly position: Position[];
  readonly speedMps: number[];
  readonly heartRateBpm: number[];
};

/** Draws from a normal distribution, held within three standard deviations. */
export function near(rng: Rng, mean: number, sd: number): number {
  return mean + sd * Math.max(-3, Math.min(3, standardNormal(rng)));
}

/** Collects a motion step by step from speed and course. */
export class Mover {
  readonly motion: Motion = { timeS: [], position: [], speedMps: [], heartRateBpm: [] };
  private timeS = 0;
  private effort = 95;

  constructor(
    private here: Position,
    private readonly rng: Rng,
  ) {}

  get elapsedS(): number {
    return this.timeS;
  }

  get position(): Position {
    return this.here;
  }

  /** Moves one step at a speed along a course; `load` 0 to 1 drives the heart. */
  step(speedMps: number, courseDeg: number, load: number): void {
    const course = (courseDeg * Math.PI) / 180;
    const way = speedMps * STEP_S;
    this.here = {
      latDeg: this.here.latDeg + (way * Math.cos(course)) / metresPerDegreeNorth(this.here.latDeg),
      lonDeg: this.here.lonDeg + (way * Math.sin(course)) / metresPerDegreeEast(this.here.latDeg),
    };
    this.timeS += STEP_S;
    // The heart follows effort with a time constant of about 40 s.
    this.effort += ((90 + 85 * load - this.effort) * STEP_S) / 40;
    this.motion.timeS.push(this.timeS);
    this.motion.position.push(this.here);
    this.motion.speedMps.push(speedMps);
    this.motion.heartRateBpm.push(Math.round(this.effort + near(this.rng, 0, 0.8)));
  }

  /** Holds a speed for a time with a little unevenness, for walking, resting, driving and paddling. */
  hold(options: {
    seconds: number;
    speedMps: number;
    courseDeg: number;
    unevenMps: number;
    load: number;
  }): void {
    const { seconds, speedMps, courseDeg, unevenMps, load } = options;
    let wobble = 0;
    for (let t = 0; t < seconds; t += STEP_S) {
      wobble += -wobble * STEP_S + unevenMps * Math.sqrt(2 * STEP_S) * near(this.rng, 0, 1);
      this.step(Math.max(0, speedMps + wobble), courseDeg + near(this.rng, 0, 4), load);
    }
  }
}
