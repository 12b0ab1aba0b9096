import { SPEED_BANDS, speedBand, type SpeedScale } from "@/lib/display/speed-ramp";
import { FLAG_ON_FOIL, type Stretch } from "@/lib/track/speed-series";
import { sampleRange, type TrackShape } from "./track-shape";

/** The kind of a run off foil; runs on foil have their speed band, 0 to SPEED_BANDS - 1. */
export const OFF_FOIL = -1;

/** Samples of one kind in a row, as indexes of the samples that shape it, both ends among them. */
export type Run = { readonly kind: number; readonly samples: readonly number[] };

export type RunOptions = {
  readonly scale: SpeedScale;
  readonly stretch?: Stretch | null;
  /** How far, metres, a drawn line may lie from the track. */
  readonly toleranceM?: number;
  /** Colours show the mean speed over about this length of track; 0 shows every sample's own. */
  readonly meanOverM?: number;
};

/** A speed must pass a band's edge by this share of the band before the colour changes: no flicker on the edge. */
const HYSTERESIS = 0.15;

/**
 * Cuts a track into runs of one colour. Neighbouring runs share their meeting sample, so the line is whole;
 * gaps in the recording and time off the water part it. Each run is thinned to the tolerance.
 */
export function trackRuns(shape: TrackShape, options: RunOptions): Run[] {
  const { scale, stretch = null, toleranceM = 1.5, meanOverM = 0 } = options;
  const speeds = meanOverM > 0 ? keptMeanSpeeds(shape, meanOverM) : shape.series.speedMps;
  const { first, end } = sampleRange(shape.series, stretch);
  const runs: Run[] = [];
  let start = -1;
  let kind = OFF_FOIL;
  const close = (last: number) => {
    if (start >= 0 && last > start) runs.push({ kind, samples: thin(shape, start, last, toleranceM) });
    start = -1;
  };
  for (let i = first; i < end; i += 1) {
    if (shape.drawn[i] !== 1) {
      close(i - 1);
      continue;
    }
    const next = kindOf(shape, speeds, i, { scale, previous: start >= 0 ? kind : null });
    if (start >= 0 && next === kind) continue;
    close(i);
    kind = next;
    start = i;
  }
  close(end - 1);
  return runs;
}

function kindOf(
  shape: TrackShape,
  speeds: Float32Array,
  sample: number,
  { scale, previous }: { scale: SpeedScale; previous: number | null },
): number {
  if (((shape.series.flags[sample] ?? 0) & FLAG_ON_FOIL) === 0) return OFF_FOIL;
  const speed = speeds[sample] ?? Number.NaN;
  const band = speedBand(speed, scale);
  if (band === null) return OFF_FOIL;
  if (previous === null || previous === OFF_FOIL || band === previous) return band;
  const margin = (HYSTERESIS * (scale.highMps - scale.lowMps)) / SPEED_BANDS;
  const eased = speedBand(band > previous ? speed - margin : speed + margin, scale);
  return eased === previous ? previous : band;
}

/** Means already worked out: every brushed stretch of a session asks for the same ones. */
const kept = new WeakMap<TrackShape, Map<number, Float32Array>>();

function keptMeanSpeeds(shape: TrackShape, lengthM: number): Float32Array {
  const ofShape = kept.get(shape) ?? new Map<number, Float32Array>();
  kept.set(shape, ofShape);
  const speeds = ofShape.get(lengthM) ?? meanSpeeds(shape, lengthM);
  ofShape.set(lengthM, speeds);
  return speeds;
}

/**
 * The mean speed on foil round each sample, over as many samples as the session's own mean speed covers
 * `lengthM` in. Seen from afar single bumps are smaller than a pixel: their colours would only flicker.
 */
function meanSpeeds({ series, drawn }: TrackShape, lengthM: number): Float32Array {
  const { count, speedMps, flags } = series;
  const sums = new Float64Array(count + 1);
  const counts = new Uint32Array(count + 1);
  let sum = 0;
  let counted = 0;
  for (let i = 0; i < count; i += 1) {
    const speed = speedMps[i] ?? Number.NaN;
    if (drawn[i] === 1 && ((flags[i] ?? 0) & FLAG_ON_FOIL) !== 0 && Number.isFinite(speed)) {
      sum += speed;
      counted += 1;
    }
    sums[i + 1] = sum;
    counts[i + 1] = counted;
  }
  const stepM = counted === 0 ? 1 : ((sum / counted) * series.stepMs) / 1000;
  const half = Math.round(lengthM / Math.max(stepM, 1e-3) / 2);
  const means = new Float32Array(count);
  for (let i = 0; i < count; i += 1) {
    const from = Math.max(0, i - half);
    const to = Math.min(count, i + half + 1);
    const samples = (counts[to] ?? 0) - (counts[from] ?? 0);
    means[i] = samples === 0 ? Number.NaN : ((sums[to] ?? 0) - (sums[from] ?? 0)) / samples;
  }
  return means;
}

/**
 * Drops samples nearer than the tolerance to the line between those kept, ends kept.
 * Source: D. Douglas and T. Peucker, 1973, "Algorithms for the reduction of the number of points required to
 * represent a digitized line", Cartographica 10(2).
 */
function thin(shape: TrackShape, first: number, last: number, toleranceM: number): number[] {
  const { eastM, northM } = shape;
  const keep = new Uint8Array(last - first + 1);
  keep[0] = 1;
  keep[last - first] = 1;
  const stack = [first, last];
  while (stack.length > 0) {
    const b = stack.pop() ?? last;
    const a = stack.pop() ?? first;
    const ax = eastM[a] ?? 0;
    const ay = northM[a] ?? 0;
    const dx = (eastM[b] ?? 0) - ax;
    const dy = (northM[b] ?? 0) - ay;
    const squared = dx * dx + dy * dy;
    let farthest = -1;
    let most = toleranceM * toleranceM;
    for (let i = a + 1; i < b; i += 1) {
      const px = (eastM[i] ?? 0) - ax;
      const py = (northM[i] ?? 0) - ay;
      const share = squared > 0 ? Math.min(1, Math.max(0, (px * dx + py * dy) / squared)) : 0;
      const away = (px - share * dx) ** 2 + (py - share * dy) ** 2;
      if (away > most) {
        most = away;
        farthest = i;
      }
    }
    if (farthest >= 0) {
      keep[farthest - first] = 1;
      stack.push(a, farthest, farthest, b);
    }
  }
  const samples: number[] = [];
  for (let i = 0; i < keep.length; i += 1) if (keep[i] === 1) samples.push(first + i);
  return samples;
}
