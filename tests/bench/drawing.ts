import { nearestSample } from "@/components/map/nearest-sample";
import { trackRuns } from "@/components/map/track-runs";
import { trackShape } from "@/components/map/track-shape";
import { trackSpeedScale } from "@/components/map/track-speed-scale";
import { seededRng } from "@/lib/numeric/rng";
import { FLAG_ON_FOIL, FLAG_ON_WATER, type SpeedSeries } from "@/lib/track/speed-series";

/** A run that wanders, all on foil. */
function wandering(count: number): SpeedSeries {
  const rng = seededRng(5);
  const latDeg = new Float64Array(count);
  const lonDeg = new Float64Array(count);
  let [lat, lon, course] = [57.1, 9.2, 1];
  for (let i = 0; i < count; i += 1) {
    course += 0.2 * (rng() - 0.5);
    lat += (7 * Math.cos(course)) / 111_400;
    lon += (7 * Math.sin(course)) / 60_500;
    latDeg[i] = lat;
    lonDeg[i] = lon;
  }
  return {
    startMs: 0,
    stepMs: 1000,
    count,
    latDeg,
    lonDeg,
    speedMps: Float32Array.from({ length: count }, (_, i) => 7 + Math.sin(i / 5)),
    speedSeMps: new Float32Array(count).fill(0.2),
    courseDeg: new Float32Array(count),
    distanceM: Float64Array.from({ length: count }, (_, i) => 7 * i),
    heartRateBpm: null,
    flags: new Uint8Array(count).fill(FLAG_ON_WATER | FLAG_ON_FOIL),
  };
}

function medianMs(times: number, work: () => void): number {
  const taken = Array.from({ length: times }, () => {
    const started = performance.now();
    work();
    return performance.now() - started;
  }).sort((a, b) => a - b);
  return taken[Math.floor(times / 2)] ?? Number.NaN;
}

/** What moving the cursor over the map and drawing the track cost, by number of samples. */
export async function benchDrawing(): Promise<void> {
  console.log("\nDrawing: time by number of samples (a frame is 16.7 ms)");
  for (const count of [3_600, 144_000]) {
    const series = wandering(count);
    const shape = trackShape(series);
    const nearest = nearestSample(shape);
    const rng = seededRng(9);
    const [west = 0, south = 0, east = 0, north = 0] = shape.bounds ?? [];
    const find = medianMs(51, () => {
      nearest.find(west + rng() * (east - west), south + rng() * (north - south), 1000, 0);
    });
    const scale = trackSpeedScale(series, "kn");
    const cut = medianMs(5, () => trackRuns(shape, { scale, toleranceM: 1.5 }));
    console.log(
      `  ${String(count).padStart(7)} samples   nearest sample ${find.toFixed(2)} ms   runs of one colour ${cut.toFixed(0)} ms`,
    );
  }
  await Promise.resolve();
}
