import { quantile } from "@/lib/numeric/quantile";
import type { Fixes } from "@/lib/track/fixes";
import { gapLimitS } from "@/lib/track/gap-limit";
import type { PreparedTrack } from "@/lib/track/prepared-track";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import { ANALYSIS_VERSION, type Analysis, type AnalysisOptions, type Discipline } from "./analysis";
import { findBumps } from "./bumps";
import { courseColumns } from "./course";
import { findOnFoil, type FoilSpan } from "./on-foil";
import { segmentsOf } from "./segments";
import { speedSeriesOf } from "./speed-series-of";
import { summarise } from "./summarise";
import { findTurns } from "./turns";
import { cumulatedWayM, foilMask } from "./way";
import { windFromBumps } from "./wind-from-bumps";
import { windFromLegs } from "./wind-from-legs";

/** A dropout is a hole longer than this (s) and than nearly all steps of the recording. Trials, no source. */
const DROPOUT_S_MIN = 3.5;

type HoleLimits = { readonly gapLimitS: number; readonly dropoutLimitS: number };

function holeLimits(fixes: Fixes): HoleLimits {
  const stride = Math.max(1, Math.floor(fixes.count / 5000));
  const steps: number[] = [];
  for (let i = 1; i < fixes.count; i += stride) {
    steps.push(((fixes.timeMs[i] ?? 0) - (fixes.timeMs[i - 1] ?? 0)) / 1000);
  }
  const limitS = gapLimitS(fixes.timeMs);
  if (steps.length === 0) return { gapLimitS: limitS, dropoutLimitS: DROPOUT_S_MIN };
  const dropoutLimitS = Math.max(DROPOUT_S_MIN, quantile(steps, 0.97) + 0.6);
  return { gapLimitS: limitS, dropoutLimitS: Math.min(limitS, dropoutLimitS) };
}

/** Wind by the rider's own courses, and for a wing the turns about it. */
function turnsAndWind(
  track: SmoothedTrack,
  spans: readonly FoilSpan[],
  onFoil: Uint8Array,
  discipline: Discipline,
): Pick<Analysis, "turns" | "windFromDeg"> {
  if (discipline === "other" || spans.length === 0) return { turns: [], windFromDeg: null };
  const columns = courseColumns(track);
  if (discipline === "downwind")
    return { turns: [], windFromDeg: windFromBumps(track, columns, spans, onFoil) };
  const windFromDeg = windFromLegs(track, columns, spans, onFoil);
  const turns = windFromDeg === null ? [] : findTurns(track, columns, spans, windFromDeg);
  return { turns, windFromDeg };
}

/** The analysis of a track that is prepared already; see `analyse`. */
export function analysePrepared(prepared: PreparedTrack, options: AnalysisOptions): Analysis {
  const track: SmoothedTrack = prepared.smoothed;
  const { timeMs, elevationM } = prepared.cleaned;
  const { spans } = findOnFoil(track, options, elevationM && { timeMs, elevationM });
  const onFoil = foilMask(track, spans);
  const wayM = cumulatedWayM(track, onFoil);
  const { bumpRides, lulls } = findBumps(track, spans, wayM, options.discipline);
  const series = speedSeriesOf({
    track,
    wayM,
    onFoil,
    rateHz: prepared.quality.rateHz,
    ...holeLimits(prepared.cleaned),
  });
  const analysed = {
    series,
    segments: segmentsOf(track, spans, wayM),
    bumpRides,
    lulls,
    quality: prepared.quality,
  };
  return {
    ...analysed,
    version: ANALYSIS_VERSION,
    rawLengthM: prepared.rawLengthM,
    rawFixes: prepared.rawFixes,
    rawSegments: prepared.rawSegments,
    firstFixMs: prepared.firstFixMs,
    lastFixMs: prepared.lastFixMs,
    window: prepared.window,
    waterSessions: prepared.waterSessions,
    figures: summarise(analysed, prepared.window),
    ...turnsAndWind(track, spans, onFoil, options.discipline),
  };
}
