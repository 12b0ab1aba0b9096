import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { Turn } from "./analysis";
import { wrapAngle, type CourseColumns } from "./course";
import type { FoilSpan } from "./on-foil";

const RAD = Math.PI / 180;
/** Courses within these of the wind's axis belong to neither side (rad). Trials, no source. */
const AXIS_UPWIND = 28 * RAD;
const AXIS_DOWNWIND = 158 * RAD;
/** A side is held by a leg of at least this (s); breaks up to that (s) do not end it. */
const LEG_S_MIN = 1.8;
const LEG_BREAK_S = 6;
/** A turn is over within this (s): metrics 9, with the legs' own hesitation. */
const TURN_S_MAX = 25;
/** Getting up again after a lost turn takes this long at most (s); later it is another story. */
const LOST_S_MAX = 400;
/** The foil is kept when no touchdown follows the turn within this (s). */
const KEPT_AFTER_S = 2;

type Leg = { readonly side: number; readonly span: number; from: number; to: number };

type Context = {
  readonly track: SmoothedTrack;
  readonly course: Float64Array;
  readonly spans: readonly FoilSpan[];
  readonly windFrom: number;
};

/** +1 with the wind on one hand, -1 on the other, 0 near its axis. */
function sideOf(course: number, windFrom: number): number {
  const off = wrapAngle(course - windFrom);
  const size = Math.abs(off);
  return size < AXIS_UPWIND || size > AXIS_DOWNWIND ? 0 : Math.sign(off);
}

/** Stretches of one side within one span, short ones and breaks passed over. */
function legsOf({ track, course, spans, windFrom }: Context): Leg[] {
  const perS = 1000 / track.stepMs;
  const raw: Leg[] = [];
  spans.forEach((span, k) => {
    for (let i = Math.ceil(span.start); i <= span.end; i++) {
      const side = sideOf(course[i] ?? 0, windFrom);
      if (side === 0) continue;
      const last = raw.at(-1);
      if (last && last.side === side && last.span === k && i - last.to < LEG_BREAK_S * perS) last.to = i;
      else raw.push({ side, span: k, from: i, to: i });
    }
  });
  const legs: Leg[] = [];
  for (const leg of raw) {
    if (leg.to - leg.from <= LEG_S_MIN * perS) continue;
    const last = legs.at(-1);
    if (last && last.side === leg.side && last.span === leg.span) last.to = leg.to;
    else legs.push(leg);
  }
  return legs;
}

const timeOf = (track: SmoothedTrack, index: number): number => track.startMs + index * track.stepMs;

/** The turn between two legs of one span: the sample at which the course is nearest to the axis it crosses. */
function turnWithin(context: Context, before: Leg, after: Leg): Turn | null {
  const { track, course, spans, windFrom } = context;
  const perS = 1000 / track.stepMs;
  if (after.from - before.to >= TURN_S_MAX * perS) return null;
  let total = 0;
  for (let i = before.to; i < after.from; i++) total += wrapAngle((course[i + 1] ?? 0) - (course[i] ?? 0));
  const middle = wrapAngle((course[before.to] ?? 0) - windFrom + total / 2);
  const kind = Math.abs(middle) < Math.PI / 2 ? "tack" : "gybe";
  const axis = kind === "tack" ? windFrom : windFrom + Math.PI;
  let nearest = before.to;
  for (let i = before.to; i <= after.from; i++) {
    const here = Math.abs(wrapAngle((course[i] ?? 0) - axis));
    if (here < Math.abs(wrapAngle((course[nearest] ?? 0) - axis))) nearest = i;
  }
  const end = spans[before.span]?.end ?? after.from;
  return {
    startMs: timeOf(track, before.to),
    endMs: timeOf(track, after.from),
    timeMs: timeOf(track, nearest),
    kind,
    keptFoil: end >= after.from + KEPT_AFTER_S * perS,
  };
}

/** The turn in which the foil was lost: the side changed between two spans; its moment is the touchdown. */
function lostTurn(context: Context, before: Leg, after: Leg): Turn | null {
  const { track, course, spans, windFrom } = context;
  const perS = 1000 / track.stepMs;
  const end = spans[before.span]?.end ?? before.to;
  const next = spans[after.span]?.start ?? after.from;
  if (next - end > LOST_S_MAX * perS) return null;
  const last = Math.floor(end);
  const from = Math.max(before.from, last - Math.round(4 * perS));
  const swing = wrapAngle((course[last] ?? 0) - (course[from] ?? 0));
  const off = wrapAngle((course[from] ?? 0) - windFrom);
  return {
    startMs: timeOf(track, from),
    endMs: timeOf(track, end),
    timeMs: timeOf(track, end),
    kind: Math.sign(swing) === -Math.sign(off) ? "tack" : "gybe",
    keptFoil: false,
  };
}

/**
 * Tacks and gybes: changes of the side on which the wind stands, between two legs on foil.
 *
 * A turn within one time on foil is timed where the course crosses the wind's axis (through the wind a tack, before it
 * a gybe); it kept the foil when no touchdown follows within 2 s. A turn that ended in the water is timed at the
 * touchdown; the way the course swung there says which it was. In: the track, course columns, spans on foil, the
 * direction the wind comes from (degrees true). Out: in order of time.
 */
export function findTurns(
  track: SmoothedTrack,
  columns: CourseColumns,
  spans: readonly FoilSpan[],
  windFromDeg: number,
): Turn[] {
  const context: Context = { track, course: columns.course, spans, windFrom: windFromDeg * RAD };
  const legs = legsOf(context);
  const turns: Turn[] = [];
  for (let k = 1; k < legs.length; k++) {
    const before = legs[k - 1];
    const after = legs[k];
    if (!before || !after || before.side === after.side) continue;
    const turn =
      before.span === after.span ? turnWithin(context, before, after) : lostTurn(context, before, after);
    if (turn) turns.push(turn);
  }
  return turns;
}
