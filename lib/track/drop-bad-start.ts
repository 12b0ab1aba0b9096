import { chainedPlane } from "@/lib/geo/chained-plane";
import { median } from "@/lib/numeric/quantile";

import { type FixDraft, keepFixes } from "./fix-draft";

const LOOK_S = 75;
const CHORD_S = 1.95;
const MOVING_MPS = 2.6;
const RESTING_MPS = 1.8;
/** A start that moves longer than this may be a rider under way unless something says otherwise. */
const SURELY_CONVERGING_S = 12;
const CONVERGING_S_MAX = 45;
const SLIDING_MPS = 12;
/** Straight way over way along: no rider keeps so straight and then stops dead; a settling receiver does. */
const RULER = 0.99;

/**
 * Step 3c of the cleaning: a receiver that starts before it has settled slides from a wrong place to the right one. When the first
 * seconds move and what follows rests, the sliding is dropped. Up to 12 s are believed to be sliding outright; up to 45 s only when the sliding is
 * faster than 12 m/s somewhere, or straight as a ruler, or the receiver's own speed (`speedMps`, by raw fix, or null) says rest.
 *
 * @example
 * dropBadStart({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }, null).count; // 0
 */
export function dropBadStart(draft: FixDraft, speedMps: Float64Array | null): FixDraft {
  const chords = startChords(draft);
  let moving = 0;
  while (moving < chords.length && (chords[moving]?.speed ?? 0) > MOVING_MPS) moving++;
  const settled = chords[moving];
  if (moving === 0 || settled === undefined || settled.atS > CONVERGING_S_MAX) return draft;
  const next = chords
    .filter((c) => c.atS - settled.atS > 1.5 && c.atS - settled.atS < 12)
    .map((c) => c.speed);
  if (next.length === 0 || median(next) > RESTING_MPS) return draft;
  const sliding = chords.slice(0, moving);
  const fastest = Math.max(...sliding.map((c) => c.speed));
  const said = speedMps ? sliding.map((c) => speedMps[draft.source[c.index] as number] ?? NaN) : [];
  const saidRest = said.length > 0 && median(said) < 1;
  const unlikeRider = fastest > SLIDING_MPS || straightness(sliding) > RULER || saidRest;
  if (settled.atS > SURELY_CONVERGING_S && !unlikeRider) return draft;
  const keep = new Uint8Array(draft.count);
  const startMs = (draft.timeMs[0] as number) + (settled.atS + 1.5) * 1000;
  for (let i = 0; i < draft.count; i++) if ((draft.timeMs[i] as number) >= startMs) keep[i] = 1;
  return keepFixes(draft, keep);
}

type Chord = {
  readonly index: number;
  readonly atS: number;
  readonly speed: number;
  readonly dx: number;
  readonly dy: number;
};

/** Length of the sum over sum of the lengths: chords overlap alike, so it is the straightness of the way. */
function straightness(chords: readonly Chord[]): number {
  let dx = 0;
  let dy = 0;
  let length = 0;
  for (const chord of chords) {
    dx += chord.dx;
    dy += chord.dy;
    length += Math.hypot(chord.dx, chord.dy);
  }
  return length > 0 ? Math.hypot(dx, dy) / length : 0;
}

/** Speeds over chords of about two seconds from each of the first fixes on; long chords across a hole are left out. */
function startChords(draft: FixDraft): Chord[] {
  const t0 = draft.timeMs[0] ?? 0;
  let n = 0;
  while (n < draft.count && n < 2000 && (draft.timeMs[n] as number) - t0 < LOOK_S * 1000) n++;
  const plane = chainedPlane(draft.latDeg, draft.lonDeg, n);
  const chords: Chord[] = [];
  for (let a = 0, b = 0; a < n; a++) {
    while (b < n && (draft.timeMs[b] as number) - (draft.timeMs[a] as number) < CHORD_S * 1000) b++;
    if (b >= n) break;
    const dt = ((draft.timeMs[b] as number) - (draft.timeMs[a] as number)) / 1000;
    if (dt > 8) break;
    const dx = (plane.xM[b] as number) - (plane.xM[a] as number);
    const dy = (plane.yM[b] as number) - (plane.yM[a] as number);
    chords.push({
      index: a,
      atS: ((draft.timeMs[a] as number) - t0) / 1000,
      speed: Math.hypot(dx, dy) / dt,
      dx,
      dy,
    });
  }
  return chords;
}
