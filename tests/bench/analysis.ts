import process from "node:process";
import { analysePrepared } from "@/lib/analysis/analyse-prepared";
import { summarise } from "@/lib/analysis/summarise";
import { seededRng, standardNormal } from "@/lib/numeric/rng";
import type { Fixes } from "@/lib/track/fixes";
import { prepareTrack } from "@/lib/track/prepare-track";

const SIZES = [7_200, 28_800, 144_000, 1_000_000] as const;
const OPTIONS = { discipline: "downwind", trim: null, minimumFlyingSpeedMps: null } as const;

/** A made session as a watch writes it: five minutes on foil over bumps, one afloat, noise of about a metre. */
function madeFixes(count: number, rateHz: number): Fixes {
  const rng = seededRng(count);
  const timeMs = new Float64Array(count);
  const latDeg = new Float64Array(count);
  const lonDeg = new Float64Array(count);
  const stepS = 1 / rateHz;
  const keep = Math.exp(-stepS / 20);
  const kick = Math.sqrt(1 - keep * keep);
  let north = 0;
  let errorEast = 0;
  let errorNorth = 0;
  for (let i = 0; i < count; i++) {
    const t = i * stepS;
    const phase = t % 360;
    north += (phase < 300 ? 6.5 + 1.5 * Math.sin(t / 1.4) : 0.7) * stepS;
    errorEast = keep * errorEast + kick * standardNormal(rng);
    errorNorth = keep * errorNorth + kick * standardNormal(rng);
    timeMs[i] = Date.UTC(2025, 5, 14, 8) + Math.round(t * 1000);
    // There and back along a meridian, so that the track stays between 50 and 51 degrees north.
    const place = Math.abs(((north / 111_200 + 1) % 2) - 1);
    latDeg[i] = 50 + place + errorNorth / 111_200;
    lonDeg[i] = 8 + errorEast / 71_000;
  }
  return {
    count,
    timeMs,
    latDeg,
    lonDeg,
    elevationM: null,
    heartRateBpm: null,
    receiverSpeedMps: null,
    hdop: null,
    satellites: null,
    segmentStarts: Uint32Array.of(0),
  };
}

/** Milliseconds of processor time of this process for some work, the least of a few rounds. */
function processorMs<T>(work: () => T, rounds: number): { readonly ms: number; readonly result: T } {
  let least = Infinity;
  let result: T | undefined;
  for (let k = 0; k < rounds; k++) {
    const before = process.cpuUsage();
    result = work();
    const used = process.cpuUsage(before);
    least = Math.min(least, (used.user + used.system) / 1000);
  }
  return { ms: least, result: result as T };
}

type Row = {
  readonly count: number;
  readonly prepareMs: number;
  readonly figuresMs: number;
  readonly brushMs: number;
};

function measure(count: number, rateHz: number): Row {
  const fixes = madeFixes(count, rateHz);
  const rounds = count < 200_000 ? 3 : 1;
  const prepared = processorMs(() => prepareTrack(fixes, { trim: null }), rounds);
  const analysed = processorMs(() => analysePrepared(prepared.result, OPTIONS), rounds);
  const { window } = analysed.result;
  const brush = processorMs(() => summarise(analysed.result, window), rounds + 2);
  return { count, prepareMs: prepared.ms, figuresMs: analysed.ms, brushMs: brush.ms };
}

const line = (cells: readonly string[]): string => cells.map((cell) => cell.padStart(14)).join("");

/**
 * Prints what cleaning, smoothing and analysing cost by number of fixes (10 Hz), each as a ratio to the smallest, and per
 * fix: linear growth keeps the last column level. Processor time, so that a busy machine changes little.
 */
export async function benchAnalysis(): Promise<void> {
  const out = (text: string): void => void process.stdout.write(`${text}\n`);
  measure(7_200, 10);
  out("analysis, processor time after reading");
  out(line(["fixes", "prepare ms", "figures ms", "one brush ms", "x fixes", "x time", "us a fix"]));
  const rows = SIZES.map((count) => measure(count, 10));
  const first = rows[0];
  for (const row of rows) {
    const total = row.prepareMs + row.figuresMs;
    const base = first ? first.prepareMs + first.figuresMs : total;
    out(
      line([
        row.count.toLocaleString("en"),
        row.prepareMs.toFixed(0),
        row.figuresMs.toFixed(0),
        row.brushMs.toFixed(1),
        (row.count / (first?.count ?? row.count)).toFixed(1),
        (total / base).toFixed(1),
        ((1000 * total) / row.count).toFixed(1),
      ]),
    );
  }
  const twoHours = measure(7_200, 1);
  out(`two hours at 1 Hz: ${(twoHours.prepareMs + twoHours.figuresMs).toFixed(0)} ms`);
}
