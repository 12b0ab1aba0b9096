import type { Stretch } from "@/lib/track/speed-series";

/** Where times lie between two edges of a drawing, in CSS pixels. */
export type TimeAxis = Stretch & { readonly leftPx: number; readonly rightPx: number };

/** The horizontal place of a time; times outside the axis lie outside the edges. */
export function pxOfTime(axis: TimeAxis, timeMs: number): number {
  const share = (timeMs - axis.startMs) / Math.max(1, axis.endMs - axis.startMs);
  return axis.leftPx + share * (axis.rightPx - axis.leftPx);
}

/** The time at a horizontal place, held within the axis. */
export function timeAtPx(axis: TimeAxis, px: number): number {
  const share = (px - axis.leftPx) / Math.max(1, axis.rightPx - axis.leftPx);
  return axis.startMs + Math.min(1, Math.max(0, share)) * (axis.endMs - axis.startMs);
}

/** Shorter than this a drag is a click. */
const BRUSH_PX_MIN = 4;

/** The stretch a drag between two places brushes, or null when it was but a click. Either direction. */
export function brushedStretch(axis: TimeAxis, fromPx: number, toPx: number): Stretch | null {
  if (Math.abs(toPx - fromPx) < BRUSH_PX_MIN) return null;
  const [a, b] = [timeAtPx(axis, fromPx), timeAtPx(axis, toPx)];
  const stretch = { startMs: Math.round(Math.min(a, b)), endMs: Math.round(Math.max(a, b)) };
  return stretch.endMs - stretch.startMs < 1000 ? null : stretch;
}
