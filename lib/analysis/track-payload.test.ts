import { describe, expect, test } from "vitest";
import { ParseError } from "@/lib/errors/parse-error";
import { gzipBytes } from "@/lib/track/gzip-bytes";
import { encodeSeries } from "@/lib/track/series-blob";
import type { SpeedSeries } from "@/lib/track/speed-series";
import { decodeTrackPayload, encodeTrackPayload, type TrackPayloadParts } from "./track-payload";

const START_MS = Date.UTC(2025, 5, 14, 11, 8);

const series: SpeedSeries = {
  startMs: START_MS,
  stepMs: 1000,
  count: 3,
  latDeg: Float64Array.of(57.1200001, 57.1200501, 57.1201001),
  lonDeg: Float64Array.of(9.3, 9.30005, 9.3001),
  speedMps: Float32Array.of(0, 6.25, 8.5),
  speedSeMps: Float32Array.of(0.25, 0.25, 0.25),
  courseDeg: Float32Array.of(NaN, 27.5, 27.5),
  distanceM: Float64Array.of(0, 6.31, 12.62),
  heartRateBpm: null,
  flags: Uint8Array.of(2, 6, 6),
};

const parts: TrackPayloadParts = {
  series: gzipBytes(encodeSeries(series)),
  segments: [
    {
      startMs: START_MS + 1000,
      endMs: START_MS + 2000.5,
      distanceM: 6.31,
      speedMpsMean: 7.375,
      speedMpsMax: 8.5,
      bearingDeg: 27.5,
      confidence: 0.875,
      takeoffEffortS: 12.25,
    },
  ],
  bumpRides: [
    {
      startMs: START_MS + 1000,
      endMs: START_MS + 2000,
      peakMs: START_MS + 1500,
      speedMpsPeak: 8.5,
      gainMps: 1.25,
      distanceM: 6.125,
    },
  ],
  lulls: [
    { startMs: START_MS, endMs: START_MS + 900, distanceM: 5.5, heightLostM: 0.375, keptFoil: true },
    { startMs: START_MS, endMs: START_MS + 950, distanceM: 5.25, heightLostM: 0.5, keptFoil: false },
  ],
  quality: {
    grade: "A",
    reasons: ["Fixes every second – no gaps."],
    rateHz: 1,
    fixesRead: 4,
    fixesKept: 3,
    spikesDropped: 1,
    gapCount: 0,
    gapShare: 0,
    noiseM: 0.3,
    receiverSpeedUsed: false,
    notes: [{ code: "spikes", count: 1, text: "One fix was dropped." }],
  },
  window: { startMs: START_MS, endMs: START_MS + 2000 },
  version: 1,
};

describe("the track payload", () => {
  test("brings series, segments, bump rides, lulls, quality and window to the other side whole", () => {
    const back = decodeTrackPayload(encodeTrackPayload(parts));
    expect(back.segments).toEqual(parts.segments);
    expect(back.bumpRides).toEqual(parts.bumpRides);
    expect(back.lulls).toEqual(parts.lulls);
    expect(back.quality).toEqual(parts.quality);
    expect(back.window).toEqual(parts.window);
    expect(back.version).toBe(1);
    expect([...back.series.latDeg]).toEqual([...series.latDeg]);
    expect([...back.series.speedMps]).toEqual([...series.speedMps]);
    expect([...back.series.flags]).toEqual([...series.flags]);
  });

  test("can be read from an ArrayBuffer and from a view into a larger one", () => {
    const bytes = encodeTrackPayload(parts);
    const larger = new Uint8Array(bytes.length + 16);
    larger.set(bytes, 16);
    expect(decodeTrackPayload(larger.subarray(16)).segments).toHaveLength(1);
    const buffer = new ArrayBuffer(bytes.length);
    new Uint8Array(buffer).set(bytes);
    expect(decodeTrackPayload(buffer).segments).toHaveLength(1);
  });

  test("is refused by ParseError wherever it is cut", () => {
    const bytes = encodeTrackPayload(parts);
    for (let length = 0; length < bytes.length; length += 1) {
      expect(() => decodeTrackPayload(bytes.subarray(0, length)), `cut at ${length}`).toThrow(ParseError);
    }
  });
});
