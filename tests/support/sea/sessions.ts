import type { Discipline } from "@/lib/analysis/analysis";
import { seededRng } from "@/lib/numeric/rng";

import { degreesOf, record, type Recording } from "./record";
import type { Receiver } from "./receivers";
import { type Foil, Ride } from "./ride";
import { comeIn, drive, goOut, rideCoastDowns, rideDownwind, rideWing } from "./riders";
import { type Truth, truthOf } from "./truth";
import { makeSea } from "./waves";

export type SessionKind = "downwind" | "wing" | "coastdown" | "pause" | "shuttle";
export const SESSION_KINDS: readonly SessionKind[] = ["downwind", "wing", "coastdown", "pause", "shuttle"];

/** A session that was truly ridden, to be recorded by any receiver. */
export type MadeSession = {
  readonly kind: SessionKind;
  readonly discipline: Discipline;
  readonly truth: Truth;
  readonly recordBy: (receiver: Receiver) => Recording;
};

const START_MS = Date.UTC(2025, 4, 17, 9, 30, 0);

function ridden(kind: SessionKind, ride: Ride, minutes: number): void {
  goOut(ride);
  if (kind === "coastdown") rideCoastDowns(ride, Math.max(3, Math.round(minutes / 2)));
  else if (kind === "wing") rideWing(ride, minutes);
  else rideDownwind(ride, kind === "downwind" ? minutes : minutes / 2);
  comeIn(ride);
  if (kind === "pause") ride.drift(ride.between(400, 700), { speed: 0, orbit: 0 });
  if (kind === "shuttle") drive(ride, minutes / 3);
  if (kind !== "pause" && kind !== "shuttle") return;
  goOut(ride);
  rideDownwind(ride, minutes / 2);
  comeIn(ride);
}

/** A session of a kind, wholly given by its seed: sea, foil, rider, place; `minutes` of riding. */
export function makeSession(kind: SessionKind, seed: number, minutes = 25): MadeSession {
  const rng = seededRng(seed);
  const between = (low: number, high: number) => low + (high - low) * rng();
  const towardsRad = between(0, 2 * Math.PI);
  const flat = kind === "coastdown";
  const sea = makeSea(
    {
      heightM: flat ? 0.03 : kind === "wing" ? between(0.2, 0.6) : between(0.7, 1.5),
      periodS: flat ? 2 : between(3.6, 5.6),
      depthM: between(4, 40),
      towardsRad,
      swellHeightM: flat ? 0.02 : between(0.1, 0.6),
      swellPeriodS: between(8, 12),
    },
    rng,
  );
  const stallMps = between(3.1, 4.1);
  const foil: Foil = { stallMps, bestGlide: between(11, 17), bestGlideMps: stallMps * between(1.3, 1.6) };
  const ride = new Ride(sea, foil, rng);
  const place = [between(-45, 60), between(-150, 150)] as const;
  ridden(kind, ride, minutes);
  const degrees = degreesOf(ride, place[0], place[1]);
  return {
    kind,
    discipline: flat ? "other" : kind === "wing" ? "wing" : "downwind",
    truth: truthOf(ride, START_MS),
    recordBy: (receiver) =>
      record(ride, degrees, receiver, {
        startMs: START_MS,
        seed: seed * 7919 + receiver.name.length * 104_729 + receiver.name.charCodeAt(0),
      }),
  };
}
