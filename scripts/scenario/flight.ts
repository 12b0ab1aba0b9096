import type { Rng } from "@/lib/numeric/rng";
import { near, STEP_S, type Form, type Mover } from "./motion";

type Course = () => number;

/** From hull speed through the take-off, pumping: four to eight seconds of rising speed. */
export function takeOff(mover: Mover, form: Form, courseDeg: number, rng: Rng): void {
  const seconds = near(rng, 6, 0.8);
  for (let t = 0; t < seconds; t += STEP_S) {
    const share = t / seconds;
    mover.step(1.4 + (form.takeoffMps + 0.5 - 1.4) * share ** 1.5, courseDeg, 1);
  }
}

/** The end of a flight: a fall brakes within a second, a stall takes three. */
export function touchDown(mover: Mover, fromMps: number, courseDeg: number, rng: Rng): void {
  const seconds = rng() < 0.6 ? near(rng, 0.9, 0.1) : near(rng, 2.8, 0.4);
  for (let t = 0; t < seconds; t += STEP_S) {
    mover.step(fromMps + (0.6 - fromMps) * Math.min(1, t / seconds), courseDeg, 0.6);
  }
}

/**
 * One flight over bumps: speed goes up onto a bump in about two fifths of the period and falls in the rest. Ends
 * after `seconds` and returns the speed it ended with.
 */
export function rideBumps(
  mover: Mover,
  form: Form,
  options: { seconds: number; course: Course; periodS: number; rng: Rng },
): number {
  const { seconds, course, periodS, rng } = options;
  let speed = form.takeoffMps + 0.5;
  let t = 0;
  while (t < seconds) {
    const gain = form.surgeMps * Math.exp(near(rng, 0, 0.35));
    const peak = form.cruiseMps + 0.55 * gain;
    const lull = Math.max(form.takeoffMps + 0.25, form.cruiseMps - 0.45 * gain);
    const whole = Math.max(5, near(rng, periodS, periodS * 0.2));
    for (const [target, span] of [
      [peak, 0.42 * whole],
      [lull, 0.58 * whole],
    ] as const) {
      const from = speed;
      for (let s = 0; s < span && t < seconds; s += STEP_S, t += STEP_S) {
        speed = from + ((target - from) * (1 - Math.cos((Math.PI * s) / span))) / 2;
        mover.step(speed, course(), 0.75);
      }
    }
  }
  return speed;
}
