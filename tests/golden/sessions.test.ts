import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { BEST_DISTANCE_KEYS, BEST_TIME_KEYS } from "@/lib/analysis/analysis";
import { summarise } from "@/lib/analysis/summarise";
import { decodeTrackPayload, encodeTrackPayload } from "@/lib/analysis/track-payload";
import { gzipBytes } from "@/lib/track/gzip-bytes";
import { encodeSeries } from "@/lib/track/series-blob";
import { analyseFile } from "@/scripts/support/analyse-file";

/**
 * Modelled sessions with known truth (see fixtures/SOURCES.md): 1 Hz with low noise, and uneven recording with mid
 * noise. Expected values are the model's own, without the receiver's noise.
 */
type Truth = {
  readonly sport: string;
  readonly flights: readonly {
    startTime: string;
    endTime: string;
    distanceM: number;
    endedBy: string;
    short: boolean;
  }[];
  readonly totals: { readonly waterDistanceM: number; readonly onFoilDistanceM: number };
  readonly bests: { readonly s2: number; readonly s10: number };
  readonly glideRatio: number;
};

const folder = path.resolve(import.meta.dirname, "../../fixtures/sessions");

async function session(name: string) {
  const truth = JSON.parse(readFileSync(path.join(folder, `${name}.truth.json`), "utf8")) as Truth;
  const [outcome] = await analyseFile(path.join(folder, `${name}.gpx.gz`), { sport: truth.sport });
  if (outcome?.kind !== "analysed") throw new Error(`${name} was refused`);
  return { truth, analysis: outcome.analysis };
}

const speedOf = (best: object): number => ("speedMps" in best ? Number(best.speedMps) : NaN);

describe.each(["coast-downs", "downwind", "wing"])("the modelled session %s", (name) => {
  it("has every flight of the truth and no other, its ends within three seconds", async () => {
    const { truth, analysis } = await session(name);
    const flights = truth.flights.filter((flight) => !flight.short);
    expect(analysis.segments).toHaveLength(flights.length);
    flights.forEach((flight, k) => {
      const segment = analysis.segments[k];
      // 3 s: uneven fixes 2.5 s apart and short dropouts leave an edge unseen for so long.
      expect(Math.abs((segment?.startMs ?? 0) - Date.parse(flight.startTime))).toBeLessThan(3000);
      // A landing is the rider's choice with the board still gliding: its end is not sharp.
      if (flight.endedBy !== "landing") {
        expect(Math.abs((segment?.endMs ?? 0) - Date.parse(flight.endTime))).toBeLessThan(3000);
      }
    });
  });

  it("has the way and the bests of the truth within what the noise allows", async () => {
    const { truth, analysis } = await session(name);
    const { figures } = analysis;
    const off = (value: number, expected: number): number => Math.abs(value / expected - 1);
    // One percent on foil and three on the water (paddling and walking overlap); three for short bests: at uneven
    // recording and mid noise one standard error of a raw 10 s mean is 2.2 %.
    expect(off(figures.onFoilDistanceM, truth.totals.onFoilDistanceM)).toBeLessThan(0.01);
    expect(off(figures.waterDistanceM, truth.totals.waterDistanceM)).toBeLessThan(0.03);
    expect(off(speedOf(figures.bests.s2), truth.bests.s2)).toBeLessThan(0.05);
    expect(off(speedOf(figures.bests.s10), truth.bests.s10)).toBeLessThan(0.03);
  });
});

describe("coast-downs without push", () => {
  it("give the lift-to-drag ratio of the model, inside the stated interval or within 5 %", async () => {
    const { truth, analysis } = await session("coast-downs");
    // 5 %: eighteen glides, each good to 15-25 %.
    expect(Math.abs((analysis.figures.glide?.ratio ?? 0) / truth.glideRatio - 1)).toBeLessThan(0.05);
  });
});

describe("lengths of sample recordings", () => {
  // Lengths: GeographicLib's GeodSolve 2.1.2, PROJ geod 9.1.1 and Vincenty agree to the millimetre; see
  // fixtures/checks/gpx_samples.csv (column length_m_geodsolve) for the files and the way.
  it.each([
    ["run.gpx", 206, 3100.563],
    ["31_08_2019.gpx", 562, 17033.884],
    ["Geotag.gpx", 9, 260.634],
  ])("%s: %i fixes and the geodesic length within 0.1 m per km", async (name, fixes, lengthM) => {
    const [outcome] = await analyseFile(path.resolve(folder, "../gpx", name), {});
    if (outcome?.kind !== "analysed") throw new Error(`${name} was refused`);
    expect(outcome.analysis.rawFixes).toBe(fixes);
    expect(Math.abs(outcome.analysis.rawLengthM - lengthM)).toBeLessThan(1e-4 * lengthM);
    expect(outcome.analysis.segments).toEqual([]);
  });
});

describe("figures in the page and in the stored row", () => {
  it.each(["coast-downs", "downwind", "wing"])(
    "agree for the whole of %s after packing and unpacking",
    async (name) => {
      const { analysis } = await session(name);
      const page = decodeTrackPayload(
        encodeTrackPayload({ ...analysis, series: gzipBytes(encodeSeries(analysis.series)) }),
      );
      const again = summarise(page, page.window);
      const stored = analysis.figures;
      expect(again.takeoffs).toBe(stored.takeoffs);
      expect(again.bumps?.rides).toBe(stored.bumps?.rides);
      expect(again.glide?.lulls).toBe(stored.glide?.lulls);
      // The way is packed to a millimetre a sample, speeds to a millimetre a second.
      expect(again.waterDistanceM).toBeCloseTo(stored.waterDistanceM, 2);
      expect(again.onFoilDistanceM).toBeCloseTo(stored.onFoilDistanceM, 1);
      for (const key of [...BEST_TIME_KEYS, ...BEST_DISTANCE_KEYS]) {
        const kept = speedOf(stored.bests[key]);
        if (Number.isNaN(kept)) expect(again.bests[key]).toEqual(stored.bests[key]);
        else expect(speedOf(again.bests[key])).toBeCloseTo(kept, 2);
      }
      expect(again.glide?.ratio).toBeCloseTo(stored.glide?.ratio ?? NaN, 1);
    },
  );
});
