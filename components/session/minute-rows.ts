import { FLAG_GAP, FLAG_ON_FOIL, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";

export type MinuteRow = Stretch & {
  readonly distanceM: number;
  /** Null when the recording has a gap over all of it. */
  readonly speedMpsMean: number | null;
  readonly speedMpsMax: number | null;
  /** Share of the known samples that are on foil, 0 to 1; null without any. */
  readonly onFoilShare: number | null;
};

const MINUTE_MS = 60_000;

/**
 * A stretch minute by minute, counted from its start; the last row may be shorter. Mean and highest speed over the samples that are
 * not in a gap, m/s; way in metres as the series cumulates it.
 */
export function minuteRows(series: SpeedSeries, stretch: Stretch): MinuteRow[] {
  const rows: MinuteRow[] = [];
  for (let startMs = stretch.startMs; startMs < stretch.endMs; startMs += MINUTE_MS) {
    rows.push(rowOf(series, { startMs, endMs: Math.min(stretch.endMs, startMs + MINUTE_MS) }));
  }
  return rows;
}

function rowOf(series: SpeedSeries, { startMs, endMs }: Stretch): MinuteRow {
  const first = Math.max(0, Math.ceil((startMs - series.startMs) / series.stepMs));
  const end = Math.min(series.count, Math.ceil((endMs - series.startMs) / series.stepMs));
  let [known, onFoil, sum, most] = [0, 0, 0, 0];
  for (let i = first; i < end; i += 1) {
    const flags = series.flags[i] ?? 0;
    const speed = series.speedMps[i] ?? Number.NaN;
    if ((flags & FLAG_GAP) !== 0 || Number.isNaN(speed)) continue;
    known += 1;
    sum += speed;
    most = Math.max(most, speed);
    if ((flags & FLAG_ON_FOIL) !== 0) onFoil += 1;
  }
  const last = Math.min(end, series.count - 1);
  const distanceM = Math.max(0, (series.distanceM[last] ?? 0) - (series.distanceM[first] ?? 0));
  if (known === 0)
    return { startMs, endMs, distanceM, speedMpsMean: null, speedMpsMax: null, onFoilShare: null };
  return {
    startMs,
    endMs,
    distanceM,
    speedMpsMean: sum / known,
    speedMpsMax: most,
    onFoilShare: onFoil / known,
  };
}
