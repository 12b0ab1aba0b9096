import { geodesicLine } from "@/lib/geo/geodesic";
import type { Rng } from "@/lib/numeric/rng";
import { rideBumps, takeOff, touchDown } from "./flight";
import { Mover, near, STEP_S, type Form, type Motion, type Position } from "./motion";

/** A course that wanders about zero as a rider links bumps: slow swings with a memory of some seconds, degrees. */
function wander(rng: Rng, sizeDeg: number, memoryS: number): () => number {
  let swing = 0;
  let drift = 0;
  const keep = Math.exp(-STEP_S / memoryS);
  return () => {
    drift = keep * drift + sizeDeg * Math.sqrt(1 - keep * keep) * near(rng, 0, 1);
    swing += ((drift - swing) * STEP_S) / 4;
    return 1.6 * swing;
  };
}

/** A run along the coast from one beach to another; `drive` puts a shuttle in front. */
export function downwinder(options: {
  from: Position;
  to: Position;
  form: Form;
  bumpPeriodS: number;
  drive: boolean;
  rng: Rng;
}): Motion {
  const { from, to, form, bumpPeriodS, drive, rng } = options;
  const mover = new Mover(from, rng);
  const legs = () => geodesicLine(mover.position.latDeg, mover.position.lonDeg, to.latDeg, to.lonDeg);
  if (drive) {
    mover.hold({ seconds: 420, speedMps: 17, courseDeg: legs().bearingDeg + 180, unevenMps: 1.5, load: 0 });
    mover.hold({ seconds: 240, speedMps: 0, courseDeg: 0, unevenMps: 0.02, load: 0.1 });
    mover.hold({ seconds: 390, speedMps: 17, courseDeg: legs().bearingDeg, unevenMps: 1.5, load: 0 });
  }
  mover.hold({ seconds: near(rng, 110, 20), speedMps: 0, courseDeg: 0, unevenMps: 0.02, load: 0.1 });
  mover.hold({
    seconds: near(rng, 45, 8),
    speedMps: 1.45,
    courseDeg: legs().bearingDeg,
    unevenMps: 0.2,
    load: 0.6,
  });
  const swing = wander(rng, 16, near(rng, 14, 3));
  while (legs().distanceM > 250 && mover.elapsedS < 3 * 3600) {
    const line = legs();
    takeOff(mover, form, line.bearingDeg, rng);
    const wanted = Math.max(20, -form.steadinessS * Math.log(1 - rng()));
    const left = (line.distanceM - 150) / form.cruiseMps;
    const course = () => legs().bearingDeg + swing();
    const speed = rideBumps(mover, form, {
      seconds: Math.min(wanted, left),
      course,
      periodS: bumpPeriodS,
      rng,
    });
    touchDown(mover, speed, legs().bearingDeg, rng);
    const rest = near(rng, 22, 6);
    mover.hold({ seconds: rest, speedMps: 0.7, courseDeg: legs().bearingDeg, unevenMps: 0.25, load: 0.4 });
  }
  mover.hold({ seconds: 60, speedMps: 1.3, courseDeg: legs().bearingDeg, unevenMps: 0.2, load: 0.5 });
  mover.hold({ seconds: near(rng, 150, 20), speedMps: 0, courseDeg: 0, unevenMps: 0.02, load: 0.1 });
  return mover.motion;
}

/** Reaching to and fro off one beach, gybing at the ends; now and then a gybe touches down. */
export function wingSession(options: {
  from: Position;
  windFromDeg: number;
  form: Form;
  minutes: number;
  bumpPeriodS: number;
  rng: Rng;
}): Motion {
  const { from, windFromDeg, form, minutes, bumpPeriodS, rng } = options;
  const mover = new Mover(from, rng);
  mover.hold({ seconds: near(rng, 90, 15), speedMps: 0, courseDeg: 0, unevenMps: 0.02, load: 0.1 });
  mover.hold({ seconds: 30, speedMps: 1.2, courseDeg: windFromDeg + 100, unevenMps: 0.2, load: 0.5 });
  const swing = wander(rng, 6, 9);
  let side = 1;
  let flying = false;
  while (mover.elapsedS < minutes * 60) {
    // Out reaches a little above the beam, back a little below, so that the rider comes home.
    const reach = windFromDeg + side * (side > 0 ? 86 : 94);
    if (!flying) takeOff(mover, form, reach, rng);
    const course = () => reach + swing();
    const speed = rideBumps(mover, form, { seconds: near(rng, 70, 15), course, periodS: bumpPeriodS, rng });
    const kept = rng() < 0.7;
    for (let t = 0; t < 7; t += STEP_S) {
      const through = reach + (side * 180 * (1 - Math.cos((Math.PI * t) / 7))) / 2;
      mover.step(speed - 1.8 * Math.sin((Math.PI * t) / 7), through, 0.7);
    }
    side = -side;
    flying = kept;
    if (!kept) {
      touchDown(mover, speed, windFromDeg + side * 90, rng);
      mover.hold({
        seconds: near(rng, 18, 4),
        speedMps: 0.5,
        courseDeg: windFromDeg + 180,
        unevenMps: 0.2,
        load: 0.4,
      });
    }
  }
  touchDown(mover, form.takeoffMps, windFromDeg + 180, rng);
  mover.hold({ seconds: 40, speedMps: 1.2, courseDeg: windFromDeg + 180, unevenMps: 0.2, load: 0.4 });
  mover.hold({ seconds: 120, speedMps: 0, courseDeg: 0, unevenMps: 0.02, load: 0.1 });
  return mover.motion;
}
