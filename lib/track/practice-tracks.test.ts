import { createReadStream, existsSync, readdirSync, readFileSync } from "node:fs";
import path from "node:path";

import { describe, expect, it } from "vitest";

import { readFile } from "@/lib/formats/read-file";

import type { Fixes } from "./fixes";
import { prepareTrack } from "./prepare-track";

const shared = path.resolve(import.meta.dirname, "../../../shared/practice");
const made = path.join(shared, "made");
const real = path.join(shared, "real");
// The practice tracks stay outside the repository; without them these checks say so by being skipped.
const here = existsSync(made) && existsSync(real);

async function fixesIn(file: string): Promise<Fixes> {
  const [outcome] = await readFile(createReadStream(file), { fileName: path.basename(file) });
  if (outcome?.kind !== "read") throw new Error(`${file} was not read`);
  return outcome.fixes;
}

type Truth = {
  perSecond: { t0: string; speed: number[]; onFoil: number[] };
  waterSessions: { start: string; end: string }[];
};

type Recorded = Record<string, { reference: { points: number; length_m: number } }>;

const list = (folder: string, ending: RegExp) =>
  here ? readdirSync(folder).filter((f) => ending.test(f)) : [];

describe.skipIf(!here)("made tracks with known truth", () => {
  it.each(list(made, /\.gpx$/))(
    "%s: speed on foil and times on the water are near the truth",
    async (name) => {
      const fixes = await fixesIn(path.join(made, name));
      const truth = JSON.parse(
        readFileSync(path.join(made, name.replace(".gpx", ".truth.json")), "utf8"),
      ) as Truth;
      const { smoothed: s, waterSessions, quality } = prepareTrack(fixes, { trim: null });
      const t0 = Date.parse(truth.perSecond.t0);
      let square = 0;
      let n = 0;
      truth.perSecond.speed.forEach((speed, i) => {
        const k = Math.round((t0 + i * 1000 - s.startMs) / s.stepMs);
        if (!truth.perSecond.onFoil[i] || !((s.gapS[k] ?? 99) === 0)) return;
        square += ((s.speedMps[k] ?? NaN) - speed) ** 2;
        n++;
      });
      const rms = Math.sqrt(square / n);
      // Two raw fixes a second apart give 1.4 x the fast and white error: 0.3 m/s at low, 0.6 at mid noise (practice README). The
      // smoother must beat that, and the receiver's own speed must halve what is left.
      const raw = name.includes("low") ? 0.3 : 0.6;
      expect(rms).toBeLessThan((quality.receiverSpeedUsed ? 0.5 : 0.8) * raw);
      const want = truth.waterSessions.map((w) => [Date.parse(w.start), Date.parse(w.end)] as const);
      const got = waterSessions.map((w) => [w.startMs, w.endMs] as const);
      expect(got).toHaveLength(want.length);
      const length = (spans: readonly (readonly [number, number])[]) =>
        spans.reduce((sum, [a, b]) => sum + b - a, 0);
      let both = 0;
      for (const [a, b] of want)
        for (const [c, d] of got) both += Math.max(0, Math.min(b, d) - Math.max(a, c));
      // Walking and paddling overlap in speed, so tens of seconds at each end are inherent: 10 % of the shortest sessions.
      expect(both / (length(want) + length(got) - both)).toBeGreaterThan(0.88);
    },
  );
});

describe.skipIf(!here)("recorded tracks", () => {
  const recorded = here
    ? (JSON.parse(readFileSync(path.join(real, "reference.json"), "utf8")) as Recorded)
    : {};

  // Source: sums of WGS84 geodesics inside segments, agreed by two or three tools (reference.json of the practice folder).
  it.each(Object.entries(recorded))(
    "%s: count and raw length are the reference",
    async (name, { reference }) => {
      const p = prepareTrack(await fixesIn(path.join(real, name)), { trim: null });
      expect(p.rawFixes).toBe(reference.points);
      expect(Math.abs(p.rawLengthM - reference.length_m)).toBeLessThan(1e-4 * reference.length_m);
    },
  );

  it.each(["w01-boat-cruise-2seg.gpx", "w02-boat-baltic-nmea.gpx", "w03-boat-ijsselmeer-nmea.gpx"])(
    "%s: a yacht under way keeps its whole way",
    async (name) => {
      const p = prepareTrack(await fixesIn(path.join(real, name)), { trim: null });
      const s = p.smoothed;
      let way = 0;
      for (let k = 0; k < s.count; k++) {
        if (s.onWater[k] && (s.gapS[k] ?? 0) <= 60) way += ((s.speedMpsLoose[k] ?? NaN) * s.stepMs) / 1000;
      }
      // At 3 m/s and 0.3 m noise the raw length is itself right to about 1 %.
      expect(Math.abs(way / p.rawLengthM - 1)).toBeLessThan(0.015);
    },
  );
});
