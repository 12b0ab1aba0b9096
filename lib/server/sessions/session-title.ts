import type { Discipline } from "@/lib/analysis/analysis";
import { compassPoint } from "@/lib/display/format-bearing";
import { distanceM } from "@/lib/geo/distance-m";
import { geodesicLine } from "@/lib/geo/geodesic";

/** A named place covers this much round it: launch, car park and the water in front. */
export const PLACE_RADIUS_M = 1500;
/** Nearer than this, start and end are one place and there is no heading to speak of. */
const APART_M_MIN = 1000;

type Position = { readonly latDeg: number; readonly lonDeg: number };
export type NamedPlace = Position & { readonly name: string };

const KIND: Readonly<Record<Discipline, string>> = {
  downwind: "Downwinder",
  wing: "Wing session",
  other: "Session",
};

/** The nearest named place whose radius the position lies in, or null. */
export function placeNear<T extends NamedPlace>(places: readonly T[], position: Position): T | null {
  let best: T | null = null;
  let bestM = PLACE_RADIUS_M;
  for (const place of places) {
    const apartM = distanceM(place.latDeg, place.lonDeg, position.latDeg, position.lonDeg);
    if (apartM <= bestM) {
      best = place;
      bestM = apartM;
    }
  }
  return best;
}

/**
 * A session's title from the names its rider gave to places: "Slettestrand to Blokhus", "Wing session at Blokhus"; without
 * names from coordinates and direction: "Downwinder heading ENE from 57.12° N 9.32° E".
 */
export function sessionTitle(
  discipline: Discipline,
  ends: { readonly from: Position; readonly to: Position },
  places: readonly NamedPlace[],
): string {
  const { from, to } = ends;
  const line = geodesicLine(from.latDeg, from.lonDeg, to.latDeg, to.lonDeg);
  const isApart = line.distanceM >= APART_M_MIN;
  const first = placeNear(places, from);
  const last = placeNear(places, to);
  if (first !== null && last !== null && first.name !== last.name) return `${first.name} to ${last.name}`;
  if (!isApart) return `${KIND[discipline]} at ${(first ?? last)?.name ?? coordinates(from)}`;
  if (first === null && last !== null) return `${KIND[discipline]} to ${last.name}`;
  return `${KIND[discipline]} heading ${compassPoint(line.bearingDeg)} from ${first?.name ?? coordinates(from)}`;
}

/** Where a session row says that it began and ended, or null for one that does not say. */
export function endsOf(row: {
  readonly startLatDeg: number | null;
  readonly startLonDeg: number | null;
  readonly endLatDeg: number | null;
  readonly endLonDeg: number | null;
}): { from: Position; to: Position } | null {
  const { startLatDeg, startLonDeg, endLatDeg, endLonDeg } = row;
  if (startLatDeg === null || startLonDeg === null || endLatDeg === null || endLonDeg === null) return null;
  return {
    from: { latDeg: startLatDeg, lonDeg: startLonDeg },
    to: { latDeg: endLatDeg, lonDeg: endLonDeg },
  };
}

/** "57.12° N 9.32° E": a hundredth of a degree is about a kilometre, near enough to know the beach. */
function coordinates({ latDeg, lonDeg }: Position): string {
  const part = (value: number, plus: string, minus: string) =>
    `${Math.abs(value).toFixed(2)}° ${value < 0 ? minus : plus}`;
  return `${part(latDeg, "N", "S")} ${part(lonDeg, "E", "W")}`;
}
