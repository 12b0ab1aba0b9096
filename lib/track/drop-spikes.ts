import { chainedPlane } from "@/lib/geo/chained-plane";

import { type FixDraft, keepFixes } from "./fix-draft";
import { localVelocity, type TimedPlane, type Velocity } from "./local-velocity";

/** Departure from the local course that no rider makes in one step, and what each second of it may add (4.5 m/s is a hard fall or a launch). */
const JUMP_M = 7;
const JUMP_MPS = 4.5;
/** Steps over a longer time say nothing about a jump. */
const STEP_S_MAX = 20;
/** A wrong block ends by a jump back within this time; after a leap faster than any vehicle here, within the longer one. */
const BLOCK_S = 6.5;
const BLOCK_S_AFTER_LEAP = 300;
const LEAP_MPS = 60;
/** The local velocity is looked for over at least this many of the steps at hand: an uneven recorder has long ones. */
const REACH_STEPS = 2.2;
/** No local velocity is above this, so that short steps of fast recordings need no closer look. */
const FASTEST_MPS = 40;
/** Fixes looked at in all searches together: bounds the time on a file that is nothing but leaps. */
const SEARCH_BUDGET = 3_000_000;

/**
 * Step 3b of the cleaning: spikes and blocks of wrong fixes. A fix is suspect when its step departs from the robust
 * local velocity by more than a body can; it and those after it are dropped when, some seconds later, an equally sudden
 * jump brings the path back to where the velocities on both sides say it should be. No global speed limit is used.
 * A leap without a way back stays: see `LEAP_MPS` in the smoother, which never bridges it.
 *
 * @example
 * dropSpikes({ count: 0, timeMs: new Float64Array(0), latDeg: new Float64Array(0), lonDeg: new Float64Array(0), source: new Uint32Array(0) }, 1).count; // 0
 */
export function dropSpikes(draft: FixDraft, medianStepS: number): FixDraft {
  const { count } = draft;
  if (count < 3) return draft;
  const plane = chainedPlane(draft.latDeg, draft.lonDeg, count);
  const t0 = draft.timeMs[0] as number;
  const path: TimedPlane = {
    ...plane,
    count,
    timeS: Float64Array.from(draft.timeMs, (t) => (t - t0) / 1000),
  };
  const keep = new Uint8Array(count).fill(1);
  const search = { path, medianStepS, reachS: Math.max(4, 4 * medianStepS), budget: SEARCH_BUDGET };
  const before: Velocity = { east: 0, north: 0 };
  for (let i = 1; i < count; i++) {
    const jumpM = departure(search, i, before);
    if (Number.isNaN(jumpM)) continue;
    const end = blockEnd(search, i, before, jumpM);
    if (end > i) {
      keep.fill(0, i, end);
      i = end;
    }
  }
  return keepFixes(draft, keep);
}

/** How far step i - 1 to i departs from the velocity before it, or NaN when a rider could have done it. */
function departure(search: Search, i: number, before: Velocity): number {
  const { path, reachS } = search;
  const dt = (path.timeS[i] as number) - (path.timeS[i - 1] as number);
  if (dt > STEP_S_MAX) return NaN;
  const dx = (path.xM[i] as number) - (path.xM[i - 1] as number);
  const dy = (path.yM[i] as number) - (path.yM[i - 1] as number);
  const allowed = JUMP_M + JUMP_MPS * Math.min(dt, 4) * Math.min(1, dt > 0.9 ? 1 : dt);
  if (Math.sqrt(dx * dx + dy * dy) + FASTEST_MPS * dt < allowed) return NaN;
  localVelocity(path, { from: i - 1, direction: -1, reachS: Math.max(reachS, REACH_STEPS * dt) }, before);
  const ex = dx - before.east * dt;
  const ey = dy - before.north * dt;
  const off = Math.sqrt(ex * ex + ey * ey);
  return off > allowed ? off : NaN;
}

/**
 * Distance (m) of a way from one that goes at one velocity first and at the other after, half the time each or, about one or two fixes left
 * out, turning whenever fits best.
 */
function missOf(
  east: number,
  north: number,
  way: {
    readonly before: Velocity;
    readonly after: Velocity;
    readonly dt: number;
    readonly freely: boolean;
  },
): number {
  const { before, after, dt } = way;
  const dx = (after.east - before.east) * dt;
  const dy = (after.north - before.north) * dt;
  const offX = east - before.east * dt;
  const offY = north - before.north * dt;
  const square = dx * dx + dy * dy;
  const turned = square > 0 ? Math.max(0, Math.min(1, (offX * dx + offY * dy) / square)) : 0;
  const share = way.freely ? turned : 0.5;
  return Math.hypot(offX - share * dx, offY - share * dy);
}

type Search = {
  readonly path: TimedPlane;
  readonly medianStepS: number;
  readonly reachS: number;
  budget: number;
};

/** First fix after the wrong block that starts at `i`, or -1 when the path does not come back. */
function blockEnd(search: Search, i: number, before: Velocity, jumpM: number): number {
  const { path } = search;
  const { timeS, xM, yM } = path;
  const stepS = (timeS[i] as number) - (timeS[i - 1] as number);
  const leap = jumpM / Math.max(stepS, 0.2) > LEAP_MPS && jumpM > 100;
  const withinS = (leap ? BLOCK_S_AFTER_LEAP : BLOCK_S) + 2 * search.medianStepS;
  const after: Velocity = { east: 0, north: 0 };
  for (let j = i + 1; j < path.count && (timeS[j] as number) - (timeS[i] as number) <= withinS; j++) {
    if (search.budget-- <= 0) return -1;
    const lastS = (timeS[j] as number) - (timeS[j - 1] as number);
    const stepX = (xM[j] as number) - (xM[j - 1] as number);
    const stepY = (yM[j] as number) - (yM[j - 1] as number);
    if (Math.hypot(stepX, stepY) < 0.25 * jumpM && jumpM > 40) continue;
    const reachS = Math.max(search.reachS, REACH_STEPS * lastS);
    if (!localVelocity(path, { from: j, direction: 1, reachS }, after)) {
      after.east = before.east;
      after.north = before.north;
    }
    const backM = Math.hypot(stepX - after.east * lastS, stepY - after.north * lastS);
    if (backM < 6) continue;
    const dt = (timeS[j] as number) - (timeS[i - 1] as number);
    const missM = missOf(
      (xM[j] as number) - (xM[i - 1] as number),
      (yM[j] as number) - (yM[i - 1] as number),
      {
        before,
        after,
        dt,
        freely: j <= i + 2,
      },
    );
    const size = Math.max(jumpM, backM);
    const slack = Math.max(6, Math.min(0.35 * size, 40)) + (dt > 12 ? 6 : 1.2) * dt;
    if (missM < slack && missM < 0.6 * size) return j;
  }
  return -1;
}
