import { standardNormal } from "@/lib/numeric/rng";

import { type Ended, type Ride, TRUE_STEP_S } from "./ride";

const DEGREE = Math.PI / 180;

/** A correlated random value that begins anew for every use. */
function wandering(ride: Ride, sd: number, timeS: number): () => number {
  const keep = Math.exp(-TRUE_STEP_S / timeS);
  let value = sd * standardNormal(ride.rng);
  return () => (value = keep * value + sd * Math.sqrt(1 - keep * keep) * standardNormal(ride.rng));
}

/** Beach, walk and paddle out; the session on the water begins between them. */
export function goOut(ride: Ride): void {
  const out = ride.sea.towardsRad + ride.between(-0.9, 0.9);
  ride.drift(ride.between(30, 120), { speed: 0, orbit: 0 });
  ride.drift(ride.between(20, 60), { speed: 1.15, heading: out, timeS: 0.6, orbit: 0 });
  ride.enterWater();
  ride.drift(ride.between(15, 40), { speed: 0.6, heading: out });
  ride.drift(ride.between(40, 140), { speed: 1.35, heading: out });
}

export function comeIn(ride: Ride): void {
  const home = ride.sea.towardsRad + ride.between(-0.9, 0.9);
  ride.drift(ride.between(30, 90), { speed: 1.3, heading: home });
  ride.leaveWater();
  ride.drift(ride.between(20, 60), { speed: 1.1, heading: home, timeS: 0.6, orbit: 0 });
  ride.drift(ride.between(30, 150), { speed: 0, timeS: 0.5, orbit: 0 });
}

/** A drive along a road back to the start, with stops. */
export function drive(ride: Ride, minutes: number): void {
  ride.drift(ride.between(200, 400), { speed: 0, timeS: 0.5, orbit: 0 });
  const end = ride.timeS + minutes * 60;
  let road = ride.sea.towardsRad + Math.PI;
  while (ride.timeS < end) {
    road += ride.between(-0.5, 0.5);
    const speed = ride.rng() < 0.15 ? 0 : ride.between(9, 24);
    ride.drift(ride.between(12, 50), { speed, heading: road, timeS: 5, orbit: 0 });
  }
  ride.drift(ride.between(150, 300), { speed: 0, timeS: 2, orbit: 0 });
}

/** Sits or lies between rides. */
function rest(ride: Ride): void {
  ride.drift(ride.between(5, 45), { speed: ride.between(0.1, 0.5), timeS: 1 });
}

/** Rides bumps down the wind: weaves to stay on faces, pumps when slow, tires, falls now and then. */
export function rideDownwind(ride: Ride, minutes: number): void {
  const end = ride.timeS + minutes * 60;
  while (ride.timeS < end) {
    ride.drift(ride.between(4, 15), { speed: 1.7, heading: ride.sea.towardsRad });
    ride.takeOff(ride.sea.towardsRad);
    ride.touchDown(flyDownwind(ride, ride.timeS + ride.between(15, 420)));
    rest(ride);
  }
}

function flyDownwind(ride: Ride, wantedEndS: number): Ended {
  const wander = wandering(ride, 14 * DEGREE, 12);
  const ends: Ended = ride.rng() < 0.5 ? "fall" : ride.rng() < 0.3 ? "landing" : "stall";
  let breath = 1;
  let pumping = true;
  const slowMps = 1.3 * ride.foil.stallMps;
  while (true) {
    const tired = ride.timeS > wantedEndS && ends === "stall";
    if (ride.timeS > wantedEndS && ends !== "stall") return ends;
    if (pumping ? ride.speed > slowMps * 1.15 : ride.speed < slowMps) pumping = !pumping;
    breath = Math.min(1, Math.max(0.35, breath + (pumping ? -0.012 : 0.03) * TRUE_STEP_S));
    const pump = pumping && !tired ? 1.5 * breath : 0;
    // Off the wave's back, onto its face: bear away from a slope that brakes.
    const slope = ride.slopeAhead();
    ride.turnTowards(ride.sea.towardsRad + wander() + (slope > 0 ? 0.25 : 0), 0.25);
    const lead = ride.speed < slowMps && !tired ? 0.25 : 0;
    if (!ride.flyStep(0.32 + pump + lead + Math.max(-0.6, (8 - ride.speed) * 0.05))) return "stall";
    if (ride.timeS > wantedEndS + 90) return "landing";
  }
}

/** How fast a hand wing goes at an angle to the wind (0 upwind), as a share of its best. */
const polar = (angleRad: number): number => 0.62 + 0.38 * Math.sin(Math.min(Math.PI, angleRad * 0.8)) ** 2;

/** Reaches to and fro across the wind with gybes and tacks. */
export function rideWing(ride: Ride, minutes: number): void {
  const end = ride.timeS + minutes * 60;
  const best = ride.foil.stallMps * ride.between(1.85, 2.2);
  let side = ride.rng() < 0.5 ? 1 : -1;
  while (ride.timeS < end) {
    const from = ride.sea.towardsRad + Math.PI;
    ride.drift(ride.between(3, 10), { speed: 1.5, heading: from + side * 80 * DEGREE });
    ride.takeOff(from + side * 95 * DEGREE);
    const ended = flyWing(ride, { endS: ride.timeS + ride.between(40, 500), best, side });
    side = ended.side;
    ride.touchDown(ended.by);
    rest(ride);
  }
}

type Reach = { readonly endS: number; readonly best: number; readonly side: number };

function flyWing(ride: Ride, reach: Reach): { by: Ended; side: number } {
  const from = ride.sea.towardsRad + Math.PI;
  const gust = wandering(ride, 0.07, 15);
  const waver = wandering(ride, 5 * DEGREE, 8);
  let { side } = reach;
  while (true) {
    const legEndS = ride.timeS + ride.between(12, 60);
    const angle = ride.between(52, 122) * DEGREE;
    while (ride.timeS < legEndS) {
      if (ride.timeS > reach.endS) return { by: ride.rng() < 0.5 ? "fall" : "landing", side };
      ride.turnTowards(from + side * angle + waver(), 0.4);
      if (!pullWing(ride, reach.best * (1 + gust()), angle)) return { by: "stall", side };
    }
    const tack = ride.rng() < 0.25;
    const fall = ride.rng() < 0.15;
    const kept = turnWing(ride, { reach, side, tack, fall });
    side = -side;
    if (!kept) return { by: "fall", side };
  }
}

/** The wing pulls the speed to what the wind gives within some seconds; the drag is part of that. */
function pullWing(ride: Ride, best: number, angle: number): boolean {
  const wanted = best * polar(angle);
  const drag = 9.8 / 12;
  return ride.flyStep(drag + Math.max(-1.2, Math.min(1.1, (wanted - ride.speed) / 3.5)));
}

function turnWing(
  ride: Ride,
  how: { readonly reach: Reach; readonly side: number; readonly tack: boolean; readonly fall: boolean },
): boolean {
  const from = ride.sea.towardsRad + Math.PI;
  const over = how.tack ? from : from + Math.PI;
  const target = from - how.side * ride.between(70, 110) * DEGREE;
  const rate = ride.between(16, 30) * DEGREE;
  // The short way round is through the wind for a tack, through its lee for a gybe.
  const way = how.tack ? -how.side : how.side;
  const fallS = how.fall ? ride.timeS + ride.between(1.5, 4.5) : Infinity;
  const offAxis = () => Math.sin(ride.heading - over);
  let crossed = false;
  const lose = (): boolean => {
    if (!crossed) ride.turns.push({ index: ride.index, kind: how.tack ? "tack" : "gybe", keptFoil: false });
    const last = ride.turns.at(-1);
    if (last) last.keptFoil = false;
    return false;
  };
  for (;;) {
    const before = offAxis();
    ride.heading += way * rate * TRUE_STEP_S;
    if (!crossed && before * offAxis() <= 0 && Math.cos(ride.heading - over) > 0) {
      crossed = true;
      ride.turns.push({ index: ride.index, kind: how.tack ? "tack" : "gybe", keptFoil: true });
    }
    const keeps = pullWing(ride, how.reach.best * (how.tack ? 0.68 : 0.78), 1.6);
    if (!keeps || ride.timeS > fallS) return lose();
    if (crossed && Math.cos(ride.heading - target) > 0.98) return true;
  }
}

/** Coasts down on flat water: towed or pumped up, then gliding straight to the stall. */
export function rideCoastDowns(ride: Ride, runs: number): void {
  for (let i = 0; i < runs; i++) {
    const heading = ride.sea.towardsRad + (i % 2) * Math.PI;
    ride.drift(ride.between(5, 15), { speed: 1.5, heading });
    ride.takeOff(heading);
    const top = ride.foil.stallMps * ride.between(1.9, 2.2);
    while (ride.speed < top) {
      ride.turnTowards(heading, 0.3);
      ride.flyStep(1.9);
    }
    const towedTo = ride.timeS + ride.between(10, 40);
    while (ride.timeS < towedTo) {
      ride.turnTowards(heading, 0.3);
      ride.flyStep(1.2 + 2 * (top - ride.speed));
    }
    while (ride.flyStep(0)) ride.turnTowards(heading, 0.3);
    ride.touchDown("stall");
    ride.drift(ride.between(20, 60), { speed: 0.3 });
  }
}
