import type { BumpRide, OnFoilSegment } from "@/lib/analysis/analysis";
import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";
import type { Surface } from "./layered-canvas";
import { pixelColumns } from "./pixel-columns";
import { pxOfTime, type TimeAxis } from "./time-axis";

/** A setup ridden from when to when, as a labelled bar. */
export type GearBar = Stretch & { readonly label: string; readonly setupId: string };

export type Strips = {
  readonly segments: readonly OnFoilSegment[];
  readonly bumpRides: readonly BumpRide[];
  readonly gear: readonly GearBar[];
  readonly series: SpeedSeries;
};

const BLOCK = 10;
const COMB = 26;
const GEAR = 22;
const HEART = 34;
const SPACE = 8;

/** The height all strips take, CSS pixels. */
export function stripsHeight({ gear, series }: Strips): number {
  const heart = series.heartRateBpm === null ? 0 : HEART + SPACE;
  return BLOCK + SPACE + COMB + SPACE + (gear.length > 0 ? GEAR + SPACE : 0) + heart;
}

function label(surface: Surface, text: string, y: number): void {
  const { context, tokens } = surface;
  context.fillStyle = tokens.muted;
  context.font = "11px Archivo, system-ui, sans-serif";
  context.textAlign = "left";
  context.textBaseline = "middle";
  context.fillText(text, 0, y);
}

function span(axis: TimeAxis, stretch: Stretch): { x: number; width: number } | null {
  const left = Math.max(axis.leftPx, pxOfTime(axis, stretch.startMs));
  const right = Math.min(axis.rightPx, pxOfTime(axis, stretch.endMs));
  return right <= left ? null : { x: left, width: Math.max(1, right - left) };
}

function drawComb(surface: Surface, axis: TimeAxis, rides: readonly BumpRide[], top: number): void {
  const { context, tokens } = surface;
  const most = Math.max(0.1, ...rides.map((ride) => ride.gainMps));
  context.strokeStyle = tokens.buoy;
  context.lineWidth = 1.25;
  context.beginPath();
  for (const ride of rides) {
    const x = pxOfTime(axis, ride.peakMs);
    if (x < axis.leftPx || x > axis.rightPx) continue;
    context.moveTo(x, top + COMB);
    context.lineTo(x, top + COMB - Math.max(2, (ride.gainMps / most) * COMB));
  }
  context.stroke();
}

function drawGear(surface: Surface, axis: TimeAxis, gear: readonly GearBar[], top: number): void {
  const { context, tokens } = surface;
  const order = [...new Set(gear.map((bar) => bar.setupId))];
  for (const bar of gear) {
    const at = span(axis, bar);
    if (at === null) continue;
    context.fillStyle = order.indexOf(bar.setupId) % 2 === 0 ? tokens.kelp : tokens.shell;
    context.fillRect(at.x, top, at.width, GEAR);
    context.strokeStyle = tokens.ink;
    context.lineWidth = 1;
    context.strokeRect(at.x + 0.5, top + 0.5, at.width - 1, GEAR - 1);
    context.save();
    context.beginPath();
    context.rect(at.x, top, at.width - 4, GEAR);
    context.clip();
    context.fillStyle = tokens.ink;
    context.font = "12px Archivo, system-ui, sans-serif";
    context.textAlign = "left";
    context.textBaseline = "middle";
    context.fillText(bar.label, at.x + 6, top + GEAR / 2 + 1);
    context.restore();
  }
}

function drawHeart(surface: Surface, axis: TimeAxis, series: SpeedSeries, top: number): void {
  if (series.heartRateBpm === null) return;
  const { context, tokens } = surface;
  const index = (timeMs: number) => (timeMs - series.startMs) / series.stepMs;
  const width = axis.rightPx - axis.leftPx;
  const { least, most } = pixelColumns(series.heartRateBpm, {
    from: index(axis.startMs),
    to: index(axis.endMs),
    width,
  });
  const known = [...least, ...most].filter((value) => !Number.isNaN(value));
  if (known.length === 0) return;
  const [low, high] = [Math.min(...known), Math.max(...known)];
  const y = (bpm: number) => top + HEART - 2 - ((bpm - low) / Math.max(1, high - low)) * (HEART - 4);
  context.strokeStyle = tokens.muted;
  context.lineWidth = 1;
  context.beginPath();
  for (let column = 0; column < least.length; column += 1) {
    const value = ((least[column] ?? Number.NaN) + (most[column] ?? Number.NaN)) / 2;
    if (Number.isNaN(value)) continue;
    const before = least[column - 1];
    if (before === undefined || Number.isNaN(before)) context.moveTo(axis.leftPx + column, y(value));
    else context.lineTo(axis.leftPx + column, y(value));
  }
  context.stroke();
  context.fillStyle = tokens.muted;
  context.font = '10px "Spline Sans Mono", ui-monospace, monospace';
  context.textAlign = "left";
  context.textBaseline = "top";
  context.fillText(`${Math.round(low)}–${Math.round(high)}`, 0, top + HEART / 2 + 6);
}

/** Draws the strips under the speed chart: solid blocks on foil, the comb of bump rides, gear bars, heart rate. */
export function drawStrips(surface: Surface, axis: TimeAxis, strips: Strips, top: number): void {
  const { context, tokens } = surface;
  let y = top;
  label(surface, "on foil", y + BLOCK / 2);
  context.fillStyle = tokens.ink;
  for (const segment of strips.segments) {
    const at = span(axis, segment);
    if (at !== null) context.fillRect(at.x, y, at.width, BLOCK);
  }
  y += BLOCK + SPACE;
  label(surface, "bumps", y + COMB / 2);
  drawComb(surface, axis, strips.bumpRides, y);
  y += COMB + SPACE;
  if (strips.gear.length > 0) {
    label(surface, "gear", y + GEAR / 2);
    drawGear(surface, axis, strips.gear, y);
    y += GEAR + SPACE;
  }
  if (strips.series.heartRateBpm !== null) {
    label(surface, "bpm", y + HEART / 2 - 3);
    drawHeart(surface, axis, strips.series, y);
  }
}
