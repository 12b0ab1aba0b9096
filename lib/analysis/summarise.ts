import { median } from "@/lib/numeric/quantile";
import { seededRng } from "@/lib/numeric/rng";
import { FLAG_GAP, FLAG_ON_WATER, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";
import type { AnalysedTrack, BumpFigures, BumpRide, Figures, Lull, OnFoilSegment } from "./analysis";
import { bestFigures } from "./bests";
import { glideFigures } from "./glide";
import { filteredShareSe, isFiltered, meanSpeedSe } from "./mean-speed-se";
import { lastNotAbove, valueAt } from "./value-at";

/** Slower than this nobody is under way (m/s). Common practice, no source. */
export const MOVING_MPS_MIN = 0.5;
/**
 * What the smoother's own standard error does not hold of a long way: waves' to-and-fro, edges of the time on the
 * water. Share of the way; found on modelled sessions, no published source.
 */
const WAY_SHARE_SE = 0.011;
const GLIDE_SEED = 20250614;

const timeS = (stretch: Stretch): number => (stretch.endMs - stretch.startMs) / 1000;

/** Cumulated way at a time (m), straight between samples. */
export function wayAt(series: SpeedSeries, timeMs: number): number {
  return series.count === 0 ? 0 : valueAt(series.distanceM, (timeMs - series.startMs) / series.stepMs);
}

function clip(part: Stretch, stretch: Stretch): Stretch | null {
  const startMs = Math.max(part.startMs, stretch.startMs);
  const endMs = Math.min(part.endMs, stretch.endMs);
  return endMs > startMs ? { startMs, endMs } : null;
}

/** Packed times are rounded to thousandths of a millisecond: what ends with the stretch must stay inside it. */
const ROUNDING_MS = 0.01;

const isInside = (part: Stretch, stretch: Stretch): boolean =>
  part.startMs >= stretch.startMs - ROUNDING_MS && part.endMs <= stretch.endMs + ROUNDING_MS;

function movingS(series: SpeedSeries, stretch: Stretch): number {
  const { startMs, stepMs } = series;
  const first = Math.max(0, Math.ceil((stretch.startMs - startMs) / stepMs));
  const last = Math.min(series.count - 1, Math.floor((stretch.endMs - startMs) / stepMs));
  let samples = 0;
  for (let i = first; i < last; i++) {
    const known = ((series.flags[i] ?? 0) & (FLAG_GAP | FLAG_ON_WATER)) === FLAG_ON_WATER;
    if (known && (series.speedMps[i] ?? 0) >= MOVING_MPS_MIN) samples++;
  }
  return (samples * stepMs) / 1000;
}

type FoilFigures = Pick<
  Figures,
  "onFoilDistanceM" | "onFoilTimeS" | "takeoffs" | "touchdowns" | "longestSegmentM" | "longestSegmentS"
>;

function foilFigures(series: SpeedSeries, segments: readonly OnFoilSegment[], stretch: Stretch): FoilFigures {
  const lengths: number[] = [];
  const times: number[] = [];
  for (const segment of segments) {
    const part = clip(segment, stretch);
    if (!part) continue;
    const whole = Math.abs(timeS(part) - timeS(segment)) * 1000 <= 2 * ROUNDING_MS;
    lengths.push(whole ? segment.distanceM : wayAt(series, part.endMs) - wayAt(series, part.startMs));
    times.push(timeS(part));
  }
  const isIn = (timeMs: number): boolean => isInside({ startMs: timeMs, endMs: timeMs }, stretch);
  return {
    onFoilDistanceM: lengths.reduce((sum, length) => sum + length, 0),
    onFoilTimeS: times.reduce((sum, time) => sum + time, 0),
    takeoffs: segments.filter((segment) => isIn(segment.startMs)).length,
    touchdowns: segments.filter((segment) => isIn(segment.endMs)).length,
    longestSegmentM: lengths.reduce((most, length) => Math.max(most, length), 0),
    longestSegmentS: times.reduce((most, time) => Math.max(most, time), 0),
  };
}

/** Seconds between neighbouring peaks of one time on foil. */
function peakIntervalsS(rides: readonly BumpRide[], segments: readonly OnFoilSegment[]): number[] {
  const starts = segments.map((segment) => segment.startMs);
  const intervals: number[] = [];
  for (let k = 1; k < rides.length; k++) {
    const a = rides[k - 1];
    const b = rides[k];
    if (a && b && lastNotAbove(starts, a.peakMs) === lastNotAbove(starts, b.peakMs)) {
      intervals.push((b.peakMs - a.peakMs) / 1000);
    }
  }
  return intervals;
}

type BumpInput = {
  readonly track: AnalysedTrack;
  readonly rides: readonly BumpRide[];
  readonly lulls: readonly Lull[];
  readonly foil: FoilFigures;
};

function bumpFigures({ track, rides, lulls, foil }: BumpInput): BumpFigures | null {
  if (rides.length === 0 || foil.onFoilDistanceM <= 0) return null;
  let way = 0;
  let time = 0;
  let errorM2 = 0;
  let gain = 0;
  for (const ride of rides) {
    way += ride.distanceM;
    time += timeS(ride);
    gain += ride.gainMps;
    errorM2 += (meanSpeedSe(track.series, ride) * timeS(ride)) ** 2;
  }
  const intervals = peakIntervalsS(rides, track.segments);
  return {
    ridingSpeedMps: way / time,
    ridingSpeedSeMps: Math.sqrt(errorM2) / time,
    rides: rides.length,
    ridesPerKm: (rides.length * 1000) / foil.onFoilDistanceM,
    ridesPerHour: (rides.length * 3600) / foil.onFoilTimeS,
    gainMpsMean: gain / rides.length,
    intervalSMedian: median(intervals),
    lullsKeptShare: lulls.filter((lull) => lull.keptFoil).length / lulls.length,
  };
}

/**
 * Every figure of a session, or of any stretch of it, from the series and the lists of the analysis.
 *
 * Pure and quick (a few ms for a usual session), so that it runs in the browser while a stretch is brushed. The
 * stored figures of a session are this function over its whole on-water window on the same series, so the page and
 * the stored row agree to the precision with which the series is packed (under 1 mm a sample of way).
 *
 * On-foil segments are cut at the ends of the stretch; a take-off or a touchdown counts when its moment lies
 * inside; bump rides and lulls count when they lie inside wholly. In: the track, the stretch (UTC ms). Out: SI
 * figures; shares 0 to 1, 0 when there is no way or time; null and `withheld` where there is not enough data.
 */
export function summarise(track: AnalysedTrack, stretch: Stretch): Figures {
  const { series, segments } = track;
  const rides = track.bumpRides.filter((ride) => isInside(ride, stretch));
  const lulls = track.lulls.filter((lull) => isInside(lull, stretch));
  const foil = foilFigures(series, segments, stretch);
  const elapsedS = Math.max(0, timeS(stretch));
  const waterDistanceM = wayAt(series, stretch.endMs) - wayAt(series, stretch.startMs);
  const moving = movingS(series, stretch);
  const filtered = isFiltered(track.quality);
  const shareSe = filtered ? Math.hypot(WAY_SHARE_SE, filteredShareSe(Math.max(elapsedS, 1))) : WAY_SHARE_SE;
  const randomSe = series.count > 0 ? meanSpeedSe(series, stretch) * elapsedS : 0;
  return {
    startMs: stretch.startMs,
    endMs: stretch.endMs,
    elapsedS,
    movingS: moving,
    waterDistanceM,
    waterDistanceSeM: Math.hypot(randomSe, shareSe * waterDistanceM),
    ...foil,
    onFoilShareOfDistance: waterDistanceM > 0 ? Math.min(1, foil.onFoilDistanceM / waterDistanceM) : 0,
    onFoilShareOfTime: elapsedS > 0 ? Math.min(1, foil.onFoilTimeS / elapsedS) : 0,
    ...bestFigures(series, stretch, { grade: track.quality.grade, filtered }),
    bumps: bumpFigures({ track, rides, lulls, foil }),
    glide: glideFigures(lulls, seededRng(GLIDE_SEED)),
  };
}
