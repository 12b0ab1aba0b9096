import { destination } from "@/lib/geo/geodesic";
import { seededRng, standardNormal } from "@/lib/numeric/rng";

export type MadeRide = {
  /** First fix, UTC ms. */
  readonly startMs?: number;
  /** Seconds on foil. */
  readonly rideS?: number;
  readonly latDeg?: number;
  readonly lonDeg?: number;
  readonly bearingDeg?: number;
  readonly seed?: number;
};

/** Sat 14 Jun 2025, 11:08 UTC. */
export const RIDE_START_MS = Date.UTC(2025, 5, 14, 11, 8);

/**
 * A simple downwinder as a watch writes it: two minutes of rest on the water, a flight with surges every seven seconds, a minute of rest. One fix a
 * second with 0.3 m of noise. Invented; the seed makes it repeatable.
 */
export function madeGpx(ride: MadeRide = {}): string {
  const {
    startMs = RIDE_START_MS,
    rideS = 900,
    latDeg = 57.12,
    lonDeg = 9.32,
    bearingDeg = 67,
    seed = 1,
  } = ride;
  const rng = seededRng(seed);
  const fixes: string[] = [];
  let at = { latDeg, lonDeg };
  const total = 120 + rideS + 60;
  for (let second = 0; second < total; second += 1) {
    const onFoil = second >= 120 && second < 120 + rideS;
    const speed = onFoil ? 7.5 + 1.4 * Math.sin((2 * Math.PI * second) / 7) : 0.3;
    at = destination(at, bearingDeg + (onFoil ? 6 * Math.sin(second / 40) : 0), speed);
    const seen = destination(at, 360 * rng(), 0.3 * Math.abs(standardNormal(rng)));
    const time = new Date(startMs + second * 1000).toISOString();
    fixes.push(
      `<trkpt lat="${seen.latDeg.toFixed(7)}" lon="${seen.lonDeg.toFixed(7)}"><time>${time}</time></trkpt>`,
    );
  }
  return `<?xml version="1.0" encoding="UTF-8"?>\n<gpx version="1.1" creator="made" xmlns="http://www.topografix.com/GPX/1/1"><trk><trkseg>\n${fixes.join("\n")}\n</trkseg></trk></gpx>\n`;
}
