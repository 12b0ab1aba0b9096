import type { FixDraft } from "./fix-draft";

const SECOND_MS = 1000;
/** Only a recording whose steps are mostly one second has a place for a slipped fix. */
const USUAL_SHARE = 0.6;
/** A second written twice and one left out further apart than this have nothing to do with each other. */
const TOGETHER_FIXES = 20;

/**
 * Undoes slips of times that are cut to whole seconds: a receiver that measures near the turn of the second writes one second twice and
 * leaves one near it out, which would look like standing still and a leap. The fixes between the two move by a second, so that both are
 * even again. Times must be in order. A recording with other
 * steps or parts of seconds stays as it is.
 *
 * @example
 * Array.from(evenWholeSeconds({ count: 6, timeMs: Float64Array.of(0, 1000, 2000, 3000, 3000, 5000), latDeg: Float64Array.of(1, 2, 3, 4, 5, 6), lonDeg: new Float64Array(6), source: Uint32Array.of(0, 1, 2, 3, 4, 5) }).timeMs); // [0, 1000, 2000, 3000, 4000, 5000]
 */
export function evenWholeSeconds(draft: FixDraft): FixDraft {
  const { count, timeMs, latDeg, lonDeg } = draft;
  let single = 0;
  let double = 0;
  for (let i = 0; i < count; i++) {
    if ((timeMs[i] as number) % SECOND_MS !== 0) return draft;
    const step = i > 0 ? (timeMs[i] as number) - (timeMs[i - 1] as number) : NaN;
    if (step === SECOND_MS) single++;
    if (step === 0) double++;
  }
  if (double === 0 || single < USUAL_SHARE * (count - 1)) return draft;
  const times = Float64Array.from(timeMs.subarray(0, count));
  let open = 0;
  for (let i = 1; i < count; i++) {
    const step = (times[i] as number) - (times[i - 1] as number);
    const moved = latDeg[i] !== latDeg[i - 1] || lonDeg[i] !== lonDeg[i - 1];
    if (step === SECOND_MS || (step === 0 && !moved)) continue;
    const before = open;
    open = step === 0 || step === 2 * SECOND_MS ? i : 0;
    if (before === 0 || open === 0 || i - before > TOGETHER_FIXES) continue;
    const stepBefore = (times[before] as number) - (times[before - 1] as number);
    if (stepBefore === step) continue;
    // A second left out and one written twice: what lies between them slipped.
    const by = stepBefore === 0 ? SECOND_MS : -SECOND_MS;
    for (let k = before; k < i; k++) times[k] = (times[k] as number) + by;
    open = 0;
  }
  return { ...draft, timeMs: times };
}
