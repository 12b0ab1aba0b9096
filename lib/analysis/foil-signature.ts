import { quantile } from "@/lib/numeric/quantile";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { FoilSpan } from "./on-foil";

/**
 * Off the foil the hull holds a rider near walking pace; on it drag falls and the speed jumps. A displacement hull
 * passes any threshold slowly. Common practice, no source; on recorded yachts the step is 0.2 m/s, on modelled
 * foil sessions 3-9 m/s.
 */
const STEP_MPS_MIN = 1.2;
const STEP_OF_STALL_MIN = 0.35;
const QUICK_S = 12;
const QUICK_SHARE_MIN = 0.5;
/** Faster than this on average is a road or a railway, not a foil (about 33 kn). Common practice, no source. */
const MEAN_MPS_MAX = 17;
/** No foil under a person has gone so fast for a moment (about 49 kn). Common practice, no source. */
const TOP_MPS_MAX = 25;
/** A hole between fixes longer than this (s) hides what happened; more of it than these shares proves nothing. */
const HIDDEN_S = 6;
const HIDDEN_SHARE_OF_SPAN_MAX = 0.5;
const HIDDEN_SHARE_OF_ALL_MAX = 0.4;
/**
 * Water is level: heights within the middle 90 % of fixes on foil spread no wider than a receiver and a drifting
 * barometer make them (m). A receiver's height is good to about 13 m, 95 % (GPS Standard Positioning Service
 * Performance Standard 2020, from memory); recordings of modelled and recorded vessels spread 5-20 m.
 */
export const HEIGHT_SPREAD_M_MAX = 60;
/** A foil surges and sinks; a hull under way does not: spread of speed about its own 20 s mean, m/s. */
const LIVELY_MPS = 0.3;

type Edge = "quick" | "slow" | "unseen";

function meanSpeed(track: SmoothedTrack, fromIndex: number, toIndex: number): number {
  const first = Math.max(0, Math.round(fromIndex));
  const last = Math.min(track.count - 1, Math.round(toIndex));
  let sum = 0;
  let seen = 0;
  for (let i = first; i <= last; i++) {
    if ((track.gapS[i] ?? 0) > 8) continue;
    sum += track.speedMps[i] ?? 0;
    seen++;
  }
  return seen * track.stepMs >= 1000 ? sum / seen : NaN;
}

/**
 * Seconds from the last time at hull speed to the first time well above stall, walking outwards and inwards from
 * an edge; `outwards` is -1 at a take-off, +1 at a touchdown. Capped at a minute each way.
 */
function passingS(track: SmoothedTrack, index: number, outwards: 1 | -1, stallMps: number): number {
  const reach = Math.round(60000 / track.stepMs);
  const middle = Math.round(index);
  const speed = (i: number): number => track.speedMps[i] ?? 0;
  let out = middle;
  while (out > 0 && out < track.count - 1 && speed(out) > 0.7 * stallMps && Math.abs(out - middle) < reach) {
    out += outwards;
  }
  let inside = middle;
  while (
    inside > 0 &&
    inside < track.count - 1 &&
    speed(inside) < 1.15 * stallMps &&
    Math.abs(inside - middle) < reach
  ) {
    inside -= outwards;
  }
  return (Math.abs(out - inside) * track.stepMs) / 1000;
}

function edgeOf(track: SmoothedTrack, index: number, outwards: 1 | -1, stallMps: number): Edge {
  const perS = 1000 / track.stepMs;
  const window = (fromS: number, toS: number): number => {
    const a = index + outwards * fromS * perS;
    const b = index + outwards * toS * perS;
    return meanSpeed(track, Math.min(a, b), Math.max(a, b));
  };
  // Where the rider's own ends or a hole cut the flight, nothing was seen of its edge.
  const beyond = Math.round(index + outwards * perS);
  if (track.onWater[beyond] !== 1 || (track.gapS[beyond] ?? 0) > HIDDEN_S) return "unseen";
  const outside = window(3, 8);
  const inside = window(-6, -1);
  if (Number.isNaN(outside) || Number.isNaN(inside)) return "unseen";
  const needed = Math.max(STEP_MPS_MIN, STEP_OF_STALL_MIN * stallMps);
  const quick = inside - outside >= needed && passingS(track, index, outwards, stallMps) <= QUICK_S;
  return quick ? "quick" : "slow";
}

/** Spread of speed about its own 20 s mean with the noise taken out (m/s). */
function liveliness(track: SmoothedTrack, span: FoilSpan): number {
  const half = Math.round(10000 / track.stepMs);
  const stride = Math.max(1, Math.round(1000 / track.stepMs));
  let squares = 0;
  let seen = 0;
  let sum = 0;
  let inWindow = 0;
  const first = Math.ceil(span.start);
  const last = Math.floor(span.end);
  let head = first;
  let tail = first;
  for (let i = first; i <= last; i++) {
    while (head <= Math.min(last, i + half)) {
      sum += track.speedMps[head++] ?? 0;
      inWindow++;
    }
    while (tail < i - half) {
      sum -= track.speedMps[tail++] ?? 0;
      inWindow--;
    }
    if ((i - first) % stride !== 0) continue;
    const deviation = (track.speedMps[i] ?? 0) - sum / inWindow;
    squares += deviation ** 2 - (track.speedSeMps[i] ?? 0) ** 2;
    seen++;
  }
  return seen > 0 ? Math.sqrt(Math.max(0, squares / seen)) : 0;
}

type Seen = { readonly hiddenS: number; readonly timeS: number; readonly topMps: number };

function seenOf(track: SmoothedTrack, span: FoilSpan): Seen {
  let hidden = 0;
  let topMps = 0;
  const first = Math.ceil(span.start);
  const last = Math.floor(span.end);
  for (let i = first; i <= last; i++) {
    if ((track.gapS[i] ?? 0) > HIDDEN_S) hidden++;
    topMps = Math.max(topMps, track.speedMps[i] ?? 0);
  }
  const stepS = track.stepMs / 1000;
  return { hiddenS: hidden * stepS, timeS: (last - first + 1) * stepS, topMps };
}

/** Spans that were watched and that a foil could have ridden; none when most of the session was not watched. */
function plausibleSpans(track: SmoothedTrack, spans: readonly FoilSpan[]): readonly FoilSpan[] {
  const judged = spans.map((span) => ({ span, ...seenOf(track, span) }));
  const hiddenS = judged.reduce((sum, one) => sum + one.hiddenS, 0);
  const timeS = judged.reduce((sum, one) => sum + one.timeS, 0);
  if (hiddenS > HIDDEN_SHARE_OF_ALL_MAX * timeS) return [];
  return judged
    .filter((one) => one.hiddenS <= HIDDEN_SHARE_OF_SPAN_MAX * one.timeS && one.topMps <= TOP_MPS_MAX)
    .map((one) => one.span)
    .filter((span) => meanSpeed(track, span.start, span.end) <= MEAN_MPS_MAX);
}

/** Spread of the middle 90 % of recorded heights inside the spans (m); 0 when the file has none there. */
function heightSpreadM(track: SmoothedTrack, spans: readonly FoilSpan[], heights: Heights | null): number {
  if (!heights) return 0;
  const inside: number[] = [];
  let k = 0;
  for (const span of spans) {
    const startMs = track.startMs + span.start * track.stepMs;
    const endMs = track.startMs + span.end * track.stepMs;
    while (k < heights.timeMs.length && (heights.timeMs[k] ?? Infinity) < startMs) k++;
    for (; k < heights.timeMs.length && (heights.timeMs[k] ?? Infinity) <= endMs; k++) {
      const height = heights.elevationM[k] ?? NaN;
      if (Number.isFinite(height)) inside.push(height);
    }
  }
  return inside.length > 0 ? quantile(inside, 0.95) - quantile(inside, 0.05) : 0;
}

/** Recorded heights by time, ascending. */
export type Heights = { readonly timeMs: Float64Array; readonly elevationM: Float64Array };

/**
 * The spans that foiling explains, out of those that are merely fast enough.
 *
 * The whole session must show the jump between hull speed and flying speed at half of its seen take-offs and
 * touchdowns or more: else (a yacht, a kayak, a ferry) nothing is kept, unless no edge was recorded at all and the
 * speed is as lively as bumps make it. Nothing is kept when the heights climb and fall (a hill) or when most of the time
 * lies in holes of the recording. A single span is left out when it begins and ends slowly and runs as steadily as a
 * boat under way (the tow home; one cut at both ends is trusted with the rest of the session), when it is faster than any foil, or when half of it was not recorded.
 * In: the track, spans by sample index, the session's stall speed (m/s), recorded heights or null. Out: a part of
 * the spans, in order.
 */
export function keepFoiling(
  track: SmoothedTrack,
  spans: readonly FoilSpan[],
  stallMps: number,
  heights: Heights | null = null,
): readonly FoilSpan[] {
  const plausible = plausibleSpans(track, spans);
  if (heightSpreadM(track, plausible, heights) > HEIGHT_SPREAD_M_MAX) return [];
  const judged = plausible.map((span) => ({
    span,
    takeoff: edgeOf(track, span.start, -1, stallMps),
    touchdown: edgeOf(track, span.end, 1, stallMps),
  }));
  const edges = judged.flatMap((one) => [one.takeoff, one.touchdown]).filter((edge) => edge !== "unseen");
  const quick = edges.filter((edge) => edge === "quick").length;
  if (edges.length > 0 && quick < QUICK_SHARE_MIN * edges.length) return [];
  const isShown = (one: (typeof judged)[number]): boolean => {
    if (one.takeoff === "quick" || one.touchdown === "quick") return true;
    const unseen = one.takeoff === "unseen" && one.touchdown === "unseen";
    return (unseen && edges.length > 0) || liveliness(track, one.span) >= LIVELY_MPS;
  };
  return judged.filter(isShown).map(({ span }) => span);
}
