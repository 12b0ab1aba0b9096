import { encodeTrackPayload, decodeTrackPayload } from "@/lib/analysis/track-payload";
import { analyse } from "@/lib/analysis/analyse";
import { seededRng, standardNormal } from "@/lib/numeric/rng";
import type { Fixes } from "@/lib/track/fixes";
import { encodeSeries } from "@/lib/track/series-blob";

const FIXES = 144_000;

/** A ten-hour 4 Hz session swinging between lulls and peaks, with a receiver's white noise. */
function made(count: number): Fixes {
  const rng = seededRng(11);
  const timeMs = Float64Array.from({ length: count }, (_, i) => Date.UTC(2025, 5, 14, 8) + i * 250);
  const latDeg = new Float64Array(count);
  const lonDeg = new Float64Array(count);
  let [lat, lon] = [57.1, 9.2];
  for (let i = 0; i < count; i += 1) {
    const speed = 7.5 + 1.2 * Math.sin(i / 8);
    lat += (speed * 0.25 * 0.6) / 111_400;
    lon += (speed * 0.25 * 0.8) / 60_500;
    latDeg[i] = Number((lat + (0.5 * standardNormal(rng)) / 111_400).toFixed(7));
    lonDeg[i] = Number((lon + (0.5 * standardNormal(rng)) / 60_500).toFixed(7));
  }
  const nothing = {
    elevationM: null,
    heartRateBpm: null,
    receiverSpeedMps: null,
    hdop: null,
    satellites: null,
  };
  return { count, timeMs, latDeg, lonDeg, ...nothing, segmentStarts: Uint32Array.of(0) };
}

function timed<T>(work: () => T): { ms: number; value: T } {
  const started = performance.now();
  const value = work();
  return { ms: performance.now() - started, value };
}

/** Bytes and time of the track as stored and as sent to the page, against plain JSON of the same columns. */
export async function benchStoredTrack(): Promise<void> {
  const analysis = analyse(made(FIXES), { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null });
  const { series } = analysis;
  encodeSeries(series);
  const encoded = timed(() => encodeSeries(series));
  const payload = encodeTrackPayload({ ...analysis, series: encoded.value });
  decodeTrackPayload(payload);
  const decoded = timed(() => decodeTrackPayload(payload));
  const plain = timed(() =>
    JSON.stringify([
      [...series.latDeg],
      [...series.lonDeg],
      [...series.speedMps],
      [...series.speedSeMps],
      [...series.distanceM],
    ]),
  );
  const parsed = timed(() => JSON.parse(plain.value) as unknown);
  const mb = (bytes: number) => `${(bytes / 1e6).toFixed(2)} MB`;
  console.log(`\nThe stored track, ${series.count} samples of ${FIXES} fixes`);
  console.log(
    `  stored blob                       ${mb(encoded.value.length)}   (JSON ${mb(plain.value.length)}, ${(plain.value.length / encoded.value.length).toFixed(1)} x ours)`,
  );
  console.log(`  sent to the page, all told        ${mb(payload.length)}   (wanted: 1.5 MB at most)`);
  console.log(
    `  encoding                          ${encoded.ms.toFixed(0)} ms   (JSON ${(plain.ms / encoded.ms).toFixed(1)} x ours)`,
  );
  console.log(
    `  decoding in the client's code     ${decoded.ms.toFixed(0)} ms   (JSON ${(parsed.ms / decoded.ms).toFixed(1)} x ours)`,
  );
  await Promise.resolve();
}
