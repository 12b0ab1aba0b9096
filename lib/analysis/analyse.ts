import type { Fixes } from "@/lib/track/fixes";
import { prepareTrack } from "@/lib/track/prepare-track";
import { analysePrepared } from "./analyse-prepared";
import type { Analysis, AnalysisOptions } from "./analysis";

/**
 * From recorded fixes to every figure of the session: cleaning, smoothing and the on-water window (lib/track), then
 * on-foil segments, bump rides, lulls and the summary over the window.
 *
 * In: the fixes as read; what the rider said. Out: see `Analysis`. A track with nothing to analyse gives an empty
 * series, empty lists and figures of 0; nothing is thrown for bad data. The same input gives the same output.
 */
export function analyse(fixes: Fixes, options: AnalysisOptions): Analysis {
  return analysePrepared(prepareTrack(fixes, { trim: options.trim }), options);
}
