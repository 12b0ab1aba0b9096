import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { AnalysisOptions } from "./analysis";
import { keepFoiling, type Heights } from "./foil-signature";
import { placeEdges, type FoilEdges } from "./foil-edges";
import { firstStallSpeed, stallSpeedFrom, THRESHOLD_OVER_STALL } from "./flying-speed";
import { median } from "@/lib/numeric/quantile";
import { runs as runsOf, type Run } from "@/lib/numeric/runs";
import { twoStatePath } from "./two-state-path";

/** One time on foil: fractional sample indices of the smoothed track. */
export type FoilSpan = { readonly start: number; readonly end: number; readonly confidence: number };

export type OnFoil = {
  readonly spans: readonly FoilSpan[];
  /** The stall speed the session points to (m/s). */
  readonly stallMps: number;
};

export const MIN_ON_FOIL_S = 3;
export const MIN_OFF_FOIL_S = 2;

/** Log-odds: what a change of state costs; how far above the threshold counts how much a second. Trials, no source. */
const SWITCH_PENALTY = 5;
const SPEED_WIDTH_MPS = 0.45;
const ODDS_PER_S = 1.2;

/** A standard error this many times the usual one means a disturbed receiver. */
const DISTURBED_TIMES = 1.5;

/** A hole in the recording longer than this (s) ends a segment; over a shorter one the net speed speaks. */
const HOLE_S_MAX = 15;

/**
 * How much a speed counts whose standard error is larger than usual: the width of the threshold is widened by it. Where the receiver was
 * disturbed for some seconds the speeds before and after decide.
 */
function trustIn(seMps: number, usualSeMps: number): number {
  const beyond = seMps ** 2 - (DISTURBED_TIMES * usualSeMps) ** 2;
  return beyond > 0 ? SPEED_WIDTH_MPS ** 2 / (SPEED_WIDTH_MPS ** 2 + beyond) : 1;
}

function evidence(track: SmoothedTrack, thresholdMps: number, usualSeMps: number): Float32Array {
  const weight = (ODDS_PER_S * track.stepMs) / 1000;
  const odds = new Float32Array(track.count);
  for (let i = 0; i < track.count; i++) {
    const over = ((track.speedMps[i] ?? 0) - thresholdMps) / SPEED_WIDTH_MPS;
    let trust = (track.gapS[i] ?? 0) > 4 ? 0.3 : 1;
    trust *= trustIn(track.speedSeMps[i] ?? 0, usualSeMps);
    const possible = track.onWater[i] === 1 && (track.gapS[i] ?? 0) <= HOLE_S_MAX;
    odds[i] = possible ? Math.max(-4, Math.min(3, over)) * weight * trust : -20 * weight;
  }
  return odds;
}

const seconds = (track: SmoothedTrack, run: Run): number => ((run.to - run.from) * track.stepMs) / 1000;

function steadySpeeds(track: SmoothedTrack, runs: readonly Run[]): number[] {
  const head = Math.round(8000 / track.stepMs);
  const tail = Math.round(4000 / track.stepMs);
  const stride = Math.max(1, Math.round(1000 / track.stepMs));
  const speeds: number[] = [];
  for (const run of runs) {
    for (let i = run.from + head; i < run.to - tail; i += stride) {
      if (track.gapS[i] === 0) speeds.push(track.speedMps[i] ?? 0);
    }
  }
  return speeds;
}

function sampledSe(track: SmoothedTrack): number {
  const stride = Math.max(1, Math.floor(track.count / 5000));
  const values: number[] = [];
  for (let i = 0; i < track.count; i += stride) values.push(track.speedSeMps[i] ?? 0);
  return values.length > 0 ? median(values) : 0;
}

type Path = { readonly oddsOn: Float64Array; readonly runs: readonly Run[]; readonly stallMps: number };

/** The path at a threshold that follows the session's own slow riding; settles within three rounds. */
function adaptedPath(track: SmoothedTrack, options: AnalysisOptions): Path {
  const se = sampledSe(track);
  let stallMps = firstStallSpeed(options.minimumFlyingSpeedMps);
  for (let round = 0; ; round++) {
    const oddsOn = twoStatePath(evidence(track, stallMps * THRESHOLD_OVER_STALL, se), SWITCH_PENALTY);
    const runs = runsOf(track.count, (i) => (oddsOn[i] ?? 0) > 0).filter(
      (run) => seconds(track, run) >= MIN_ON_FOIL_S,
    );
    const speeds = steadySpeeds(track, runs);
    const next = speeds.length < 40 ? stallMps : stallSpeedFrom(speeds, se, options);
    if (round === 2 || Math.abs(next - stallMps) < 0.01) return { oddsOn, runs, stallMps };
    stallMps = next;
  }
}

/** The edges drawn in to the time on the water around the run, where the rider's own ends or a landing cut it. */
function onWaterPart(track: SmoothedTrack, run: Run, edges: FoilEdges): FoilEdges {
  let first = run.from;
  while (first > edges.start && first > 0 && track.onWater[first - 1] === 1) first--;
  let last = run.to;
  while (last < edges.end && last < track.count - 1 && track.onWater[last + 1] === 1) last++;
  const start = Math.max(edges.start, first);
  return { start, end: Math.max(start, Math.min(edges.end, last)) };
}

function meanConfidence(oddsOn: Float64Array, run: Run): number {
  let sum = 0;
  for (let i = run.from; i <= run.to; i++) sum += Math.tanh(Math.max(0, oddsOn[i] ?? 0) / 2);
  return sum / (run.to - run.from + 1);
}

function joinShortBreaks(spans: readonly FoilSpan[], track: SmoothedTrack): FoilSpan[] {
  const joined: FoilSpan[] = [];
  for (const span of spans) {
    const last = joined.at(-1);
    if (last && ((span.start - last.end) * track.stepMs) / 1000 < MIN_OFF_FOIL_S) {
      joined.pop();
      const weight = last.end - last.start + span.end - span.start;
      const confidence =
        weight > 0
          ? (last.confidence * (last.end - last.start) + span.confidence * (span.end - span.start)) / weight
          : last.confidence;
      joined.push({ start: last.start, end: Math.max(last.end, span.end), confidence });
    } else joined.push(span);
  }
  return joined;
}

/**
 * When the rider was on foil: the most probable two-state path over the whole smoothed speed, at a threshold
 * that follows the session's own slow riding (2.8-4.6 m/s, or the setup's minimum flying speed), with edges
 * placed afterwards by what the speed does there.
 *
 * Only time on the water counts, and a hole in the recording over 15 s ends a segment. At least 3 s on; breaks under 2 s do not end a segment. A track without the
 * signature of foiling (see `keepFoiling`, which may look at the recorded heights) has none, however fast it is.
 * Out: spans in order, not overlapping, as fractional sample indices; confidence 0 to 1 is the mean of
 * tanh(margin / 2) over the span, the margin being the log-odds of the path.
 */
export function findOnFoil(
  track: SmoothedTrack,
  options: AnalysisOptions,
  heights: Heights | null = null,
): OnFoil {
  if (track.count < 2) return { spans: [], stallMps: firstStallSpeed(options.minimumFlyingSpeedMps) };
  const { oddsOn, runs, stallMps } = adaptedPath(track, options);
  const placed = runs.map((run) => ({
    ...onWaterPart(track, run, placeEdges(track, run, { stallMps, discipline: options.discipline })),
    confidence: meanConfidence(oddsOn, run),
  }));
  const spans = joinShortBreaks(placed, track).filter(
    (span) => ((span.end - span.start) * track.stepMs) / 1000 >= MIN_ON_FOIL_S,
  );
  return { spans: keepFoiling(track, spans, stallMps, heights), stallMps };
}
