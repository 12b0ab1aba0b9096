import { gunzipBytes, isGzip } from "./gzip-bytes";
import type { SpeedSeries } from "./speed-series";
import { VarintReader, VarintWriter } from "./varint-bytes";

/** "TWS" and a version: bytes of another kind or age are refused, never guessed at. */
const MAGIC = [0x54, 0x57, 0x53] as const;
const VERSION = 1;
/** More samples than any readable file gives; bounds what a broken header can ask for. */
const MAX_COUNT = 20_000_000;

/** Steps in which a column is kept: a centimetre of place, a millimetre of way or a thousandth of a m/s is far below any receiver's error. */
export const SERIES_STEPS = {
  positionDeg: 1e-7,
  speedMps: 1e-3,
  courseDeg: 0.1,
  distanceM: 1e-3,
  heartRateBpm: 1,
} as const;

type Column = Float64Array | Float32Array;

/**
 * How a column is kept: whole numbers of `1 / perUnit`, each as the difference to what the `order` values before it
 * predict (1: the same again, 2: the same step again). `turn` is the length of a full turn for angles, 0 otherwise.
 */
type Coding = { readonly perUnit: number; readonly order: 1 | 2; readonly turn: number };

const POSITION: Coding = { perUnit: 1e7, order: 2, turn: 0 };
const SPEED: Coding = { perUnit: 1e3, order: 1, turn: 0 };
const COURSE: Coding = { perUnit: 10, order: 1, turn: 3600 };
const DISTANCE: Coding = { perUnit: 1e3, order: 2, turn: 0 };
const HEART_RATE: Coding = { perUnit: 1, order: 1, turn: 0 };

/**
 * The speed series as compact bytes: a short header, then column after column as differences in zigzag varints
 * (delta of delta for positions and distance), missing values and flags as run lengths. Compress the result with gzip to store it.
 *
 * Values come back within half a step of `SERIES_STEPS`; a missing value (NaN) stays one. Rounding keeps
 * order, so a distance that never falls still never falls. An empty series is encoded too.
 *
 * Source: differences and variable-length integers of telemetry stores are common practice; zigzag as in the Protocol
 * Buffers encoding specification (Google, 2008), section "Signed Integers".
 */
export function encodeSeries(series: SpeedSeries): Uint8Array {
  const out = new VarintWriter();
  for (const byte of MAGIC) out.byte(byte);
  out.byte(VERSION);
  out.double(series.startMs);
  out.double(series.stepMs);
  out.unsigned(series.count);
  out.byte(series.heartRateBpm === null ? 0 : 1);
  writeColumn(out, series.latDeg, POSITION);
  writeColumn(out, series.lonDeg, POSITION);
  writeColumn(out, series.speedMps, SPEED);
  writeColumn(out, series.speedSeMps, SPEED);
  writeColumn(out, series.courseDeg, COURSE);
  writeColumn(out, series.distanceM, DISTANCE);
  if (series.heartRateBpm !== null) writeColumn(out, series.heartRateBpm, HEART_RATE);
  writeRuns(out, series.count, (i) => series.flags[i] ?? 0);
  return out.done();
}

/**
 * Reads what `encodeSeries` wrote, plain or gzip-compressed.
 *
 * @throws ParseError `not_well_formed` for anything else: another kind, another version, cut short, bytes left over.
 */
export function decodeSeries(bytes: Uint8Array): SpeedSeries {
  const input = new VarintReader(isGzip(bytes) ? gunzipBytes(bytes) : bytes);
  for (const byte of MAGIC) if (input.byte() !== byte) throw input.broken("is not a speed series");
  if (input.byte() !== VERSION) throw input.broken("has a version this program does not know");
  const startMs = input.double();
  const stepMs = input.double();
  const count = input.unsigned();
  const hasHeartRate = input.byte();
  if (!Number.isFinite(startMs) || !(stepMs > 0) || count > MAX_COUNT || hasHeartRate > 1) {
    throw input.broken("has a header that makes no sense");
  }
  const latDeg = readColumn(input, new Float64Array(count), POSITION);
  const lonDeg = readColumn(input, new Float64Array(count), POSITION);
  const speedMps = readColumn(input, new Float32Array(count), SPEED);
  const speedSeMps = readColumn(input, new Float32Array(count), SPEED);
  const courseDeg = readColumn(input, new Float32Array(count), COURSE);
  const distanceM = readColumn(input, new Float64Array(count), DISTANCE);
  const heartRateBpm = hasHeartRate === 1 ? readColumn(input, new Float32Array(count), HEART_RATE) : null;
  const flags = new Uint8Array(count);
  readRuns(input, count, (value, from, to) => flags.fill(value, from, to));
  if (input.left > 0) throw input.broken("is longer than it says");
  return {
    startMs,
    stepMs,
    count,
    latDeg,
    lonDeg,
    speedMps,
    speedSeMps,
    courseDeg,
    distanceM,
    heartRateBpm,
    flags,
  };
}

function writeColumn(out: VarintWriter, values: Column, coding: Coding): void {
  writeRuns(out, values.length, (i) => (Number.isFinite(values[i]) ? 1 : 0));
  let before = 0;
  let step = 0;
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    const whole = Math.round(value * coding.perUnit);
    const change = nearTurn(whole - before, coding.turn);
    out.signed(change - step);
    before = whole;
    step = coding.order === 2 ? change : 0;
  }
}

function readColumn<T extends Column>(input: VarintReader, values: T, coding: Coding): T {
  values.fill(NaN);
  const known: { from: number; to: number }[] = [];
  readRuns(input, values.length, (value, from, to) => {
    if (value === 1) known.push({ from, to });
  });
  let before = 0;
  let step = 0;
  for (const { from, to } of known) {
    for (let i = from; i < to; i += 1) {
      const change = input.signed() + step;
      before += change;
      if (coding.turn > 0) before = ((before % coding.turn) + coding.turn) % coding.turn;
      step = coding.order === 2 ? change : 0;
      values[i] = before / coding.perUnit;
    }
  }
  return values;
}

/** The shorter way round for angles: 359.9 to 0.1 degrees is a small step forward. */
function nearTurn(change: number, turn: number): number {
  return turn === 0 ? change : change - turn * Math.round(change / turn);
}

function writeRuns(out: VarintWriter, count: number, valueAt: (index: number) => number): void {
  let start = 0;
  while (start < count) {
    const value = valueAt(start);
    let end = start + 1;
    while (end < count && valueAt(end) === value) end += 1;
    out.byte(value);
    out.unsigned(end - start);
    start = end;
  }
}

function readRuns(
  input: VarintReader,
  count: number,
  take: (value: number, from: number, to: number) => void,
): void {
  let start = 0;
  while (start < count) {
    const value = input.byte();
    const end = start + input.unsigned();
    if (end === start || end > count) throw input.broken("has runs that do not add up");
    take(value, start, end);
    start = end;
  }
}
