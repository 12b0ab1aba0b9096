import { quantile } from "@/lib/numeric/quantile";
import type { Fixes } from "@/lib/track/fixes";
import type { PreparedTrack } from "@/lib/track/prepared-track";
import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import { ANALYSIS_VERSION, type Analysis, type AnalysisOptions } from "./analysis";
import { findBumps } from "./bumps";
import { findOnFoil } from "./on-foil";
import { segmentsOf } from "./segments";
import { speedSeriesOf } from "./speed-series-of";
import { summarise } from "./summarise";
import { cumulatedWayM, foilMask } from "./way";

/** Holes between fixes that a recording makes of itself are not gaps: its usual step and a little more, s. */
const GAP_S_MIN = 3.5;
const GAP_S_MAX = 8;

function gapLimitS(fixes: Fixes): number {
  const stride = Math.max(1, Math.floor(fixes.count / 5000));
  const steps: number[] = [];
  for (let i = 1; i < fixes.count; i += stride) {
    steps.push(((fixes.timeMs[i] ?? 0) - (fixes.timeMs[i - 1] ?? 0)) / 1000);
  }
  const usual = steps.length > 0 ? quantile(steps, 0.97) : 1;
  return Math.max(GAP_S_MIN, Math.min(GAP_S_MAX, usual + 0.6));
}

/** The analysis of a track that is prepared already; see `analyse`. */
export function analysePrepared(prepared: PreparedTrack, options: AnalysisOptions): Analysis {
  const track: SmoothedTrack = prepared.smoothed;
  const { spans } = findOnFoil(track, options);
  const onFoil = foilMask(track, spans);
  const wayM = cumulatedWayM(track, onFoil);
  const { bumpRides, lulls } = findBumps(track, spans, wayM);
  const series = speedSeriesOf({
    track,
    wayM,
    onFoil,
    rateHz: prepared.quality.rateHz,
    gapLimitS: gapLimitS(prepared.cleaned),
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
    turns: [],
    windFromDeg: null,
  };
}
