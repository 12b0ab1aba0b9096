import { quantile } from "@/lib/numeric/quantile";

import { believableFixes, oneOuting } from "./believable-fixes";
import { dropBadStart } from "./drop-bad-start";
import { dropFrozen } from "./drop-frozen";
import { dropSpikes } from "./drop-spikes";
import { draftToFixes, type FixDraft } from "./fix-draft";
import type { Fixes, TrackNote } from "./fixes";
import { oneRecording } from "./one-recording";
import { orderFixes } from "./order-fixes";

/** The believed fixes, times strictly rising, with what was dropped or repaired on the way. */
export type CleanedFixes = {
  readonly fixes: Fixes;
  /** Median time between neighbouring fixes, seconds; NaN with fewer than two. */
  readonly medianStepS: number;
  readonly spikesDropped: number;
  readonly notes: readonly TrackNote[];
};

/**
 * Cleans a recorded track (steps 1 to 3 of the cleaning; gaps are found later from what is left). In this order: impossible values,
 * a second recording of the same time, time order and equal times, stray clocks, frozen runs, spikes and wrong blocks, an unsettled start. Never throws
 * on data; an empty or hopeless track gives no fixes and notes that say why.
 *
 * @example
 * cleanFixes({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), elevationM: null, heartRateBpm: null, receiverSpeedMps: null, hdop: null, satellites: null, segmentStarts: new Uint32Array(0) }).fixes.count; // 0
 */
export function cleanFixes(raw: Fixes): CleanedFixes {
  const believable = believableFixes(raw);
  const single = oneRecording(believable, raw.segmentStarts);
  const ordered = orderFixes(single);
  const outing = oneOuting(ordered.draft);
  const unfrozen = dropFrozen(outing);
  const despiked = dropSpikes(unfrozen, medianStep(unfrozen));
  const settled = dropBadStart(despiked, raw.receiverSpeedMps);
  const notes = [
    note(
      "impossible",
      raw.count - believable.count,
      (n) => `${fixesText(n)} with an impossible place or time dropped.`,
    ),
    note(
      "second_recording",
      believable.count - single.count,
      (n) => `${fixesText(n)} of a second recording of the same time left out.`,
    ),
    note("reordered", ordered.reordered, (n) => `${fixesText(n)} out of time order put in order.`),
    note("merged", ordered.merged, (n) => `${fixesText(n)} with the same time as another merged with it.`),
    note(
      "stray_time",
      ordered.draft.count - outing.count,
      (n) => `${fixesText(n)} days away from the rest left out.`,
    ),
    note(
      "frozen",
      outing.count - unfrozen.count,
      (n) => `${fixesText(n)} dropped because the place stood still while the rider moved on.`,
    ),
    note(
      "spike",
      unfrozen.count - despiked.count,
      (n) => `${fixesText(n)} dropped because the place jumped away and back.`,
    ),
    note(
      "bad_start",
      despiked.count - settled.count,
      (n) => `${fixesText(n)} at the start dropped: the receiver had not settled.`,
    ),
  ].filter((n) => n.count > 0);
  return {
    fixes: draftToFixes(settled, raw),
    medianStepS: medianStep(settled),
    spikesDropped: unfrozen.count - despiked.count,
    notes,
  };
}

function note(code: string, count: number, text: (count: number) => string): TrackNote {
  return { code, count, text: text(count) };
}

const fixesText = (count: number) => (count === 1 ? "1 fix" : `${count.toLocaleString("en-GB")} fixes`);

/** The median step, from at most some 20,000 evenly spread steps: exact enough and quick on a million fixes. */
function medianStep(draft: FixDraft): number {
  const stride = Math.max(1, Math.floor(draft.count / 20_000));
  const steps: number[] = [];
  for (let i = 1; i < draft.count; i += stride) {
    steps.push(((draft.timeMs[i] as number) - (draft.timeMs[i - 1] as number)) / 1000);
  }
  return quantile(steps, 0.5);
}
