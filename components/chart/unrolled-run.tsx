"use client";

import { useCallback, useMemo, useRef, useState, type PointerEvent } from "react";
import { speedBand, speedRamp, type SpeedScale } from "@/lib/display/speed-ramp";
import { niceTicks } from "@/lib/display/ticks";
import type { TimeCursor } from "@/lib/display/time-cursor";
import { bearingInWords } from "@/lib/display/format-bearing";
import { formatNumber } from "@/lib/display/format-number";
import { unrolledRun, type UnrolledRun as Run } from "@/lib/geo/unrolled-run";
import {
  FLAG_GAP,
  FLAG_ON_FOIL,
  FLAG_ON_WATER,
  type SpeedSeries,
  type Stretch,
} from "@/lib/track/speed-series";
import { distanceFromM, distanceToM, type DistanceUnit } from "@/lib/units/length";
import { LayeredCanvas, type Surface } from "./layered-canvas";

const HEIGHT = 190;
const PAD = { left: 12, right: 12, top: 12, bottom: 28 };
/** More points than this per pixel show nothing more. */
const POINTS_PER_PX = 3;

export type UnrolledRunProps = {
  series: SpeedSeries;
  stretch: Stretch;
  cursor: TimeCursor;
  scale: SpeedScale;
  distanceUnit: DistanceUnit;
};

/** The samples of a stretch, first to end (exclusive). */
function rangeOf(series: SpeedSeries, stretch: Stretch): { first: number; end: number } {
  const first = Math.max(0, Math.ceil((stretch.startMs - series.startMs) / series.stepMs));
  const end = Math.min(series.count, Math.floor((stretch.endMs - series.startMs) / series.stepMs) + 1);
  return { first, end: Math.max(first, end) };
}

type Place = {
  readonly x: (alongM: number) => number;
  readonly y: (asideM: number) => number;
  readonly stretched: number;
};

/** Where metres lie on the surface; sideways is stretched by a round factor as far as the height allows. */
function placeOf(run: Run, width: number, height: number): Place {
  const wide = Math.max(1, width - PAD.left - PAD.right);
  const high = height - PAD.top - PAD.bottom;
  const perM = wide / Math.max(1, run.alongMaxM - run.alongMinM);
  const room = high / Math.max(1, run.asideMaxM - run.asideMinM) / perM;
  const stretched = room >= 1 ? Math.min(10, Math.floor(room)) : Math.max(0.1, room);
  const middle = PAD.top + high / 2;
  const asideMiddle = (run.asideMaxM + run.asideMinM) / 2;
  return {
    x: (along) => PAD.left + (along - run.alongMinM) * perM,
    y: (aside) => middle + (aside - asideMiddle) * perM * stretched,
    stretched,
  };
}

/** What the drawing shows, in words: how long, which way, how far sideways is stretched. */
function wordsOf(run: Run, place: Place, unit: DistanceUnit): string {
  const length = `${formatNumber(distanceFromM(run.alongMaxM - run.alongMinM, unit), 1)}\u00a0${unit}`;
  const bearing = bearingInWords(run.bearingDeg);
  const way =
    run.kind === "line"
      ? `${length} along its line towards ${bearing}`
      : `Out and back, ${length} along ${bearing}`;
  const factor = formatNumber(place.stretched, place.stretched < 1 ? 1 : 0);
  const sideways =
    place.stretched === 1
      ? "to the same scale"
      : place.stretched > 1
        ? `stretched ${factor} times`
        : `at ${factor} of that scale`;
  return `${way}; sideways ${sideways}.`;
}

function drawScale(surface: Surface, run: Run, place: Place, unit: DistanceUnit): void {
  const { context, height, tokens } = surface;
  const low = distanceFromM(run.alongMinM, unit);
  const high = distanceFromM(run.alongMaxM, unit);
  context.font = '12px "Spline Sans Mono", ui-monospace, monospace';
  context.textBaseline = "alphabetic";
  const ticks = niceTicks(low, high, Math.max(2, Math.floor(surface.width / 110)));
  const decimals = ticks.every((tick) => tick % 1 === 0) ? 0 : 1;
  for (const tick of ticks) {
    const x = place.x(distanceToM(tick, unit));
    context.strokeStyle = tokens.hairline;
    context.beginPath();
    context.moveTo(Math.round(x) + 0.5, 0);
    context.lineTo(Math.round(x) + 0.5, height - PAD.bottom);
    context.stroke();
    context.fillStyle = tokens.muted;
    context.textAlign = x < 24 ? "left" : x > surface.width - 24 ? "right" : "center";
    context.fillText(`${formatNumber(tick, decimals)} ${unit}`, x, height - 9);
  }
}

function drawTrack(
  surface: Surface,
  series: SpeedSeries,
  run: Run,
  { place, scale }: { place: Place; scale: SpeedScale },
): void {
  const { context, tokens, theme } = surface;
  const ramp = speedRamp(theme);
  const step = Math.max(1, Math.floor(run.alongM.length / (surface.width * POINTS_PER_PX)));
  const kindAt = (k: number): number => {
    const flags = series.flags[run.first + k] ?? 0;
    if ((flags & FLAG_GAP) !== 0 || (flags & FLAG_ON_WATER) === 0) return -2;
    if ((flags & FLAG_ON_FOIL) === 0) return -1;
    return speedBand(series.speedMps[run.first + k] ?? Number.NaN, scale) ?? -1;
  };
  context.lineJoin = "round";
  let k = 0;
  while (k < run.alongM.length) {
    const kind = kindAt(k);
    context.beginPath();
    context.moveTo(place.x(run.alongM[k] ?? 0), place.y(run.asideM[k] ?? 0));
    let next = k + step;
    for (; next < run.alongM.length; next += step) {
      context.lineTo(place.x(run.alongM[next] ?? 0), place.y(run.asideM[next] ?? 0));
      if (kindAt(next) !== kind) break;
    }
    k = next;
    if (kind === -2) continue;
    context.setLineDash(kind === -1 ? [3, 4] : []);
    context.strokeStyle = kind === -1 ? tokens.muted : (ramp[kind] ?? tokens.swell);
    context.lineWidth = kind === -1 ? 1.5 : 3;
    context.stroke();
  }
  context.setLineDash([]);
}

/** The nearest sample to a place on the drawing, searched coarsely and then closely. */
function nearestSample(run: Run, place: Place, x: number, y: number): number {
  const n = run.alongM.length;
  const away = (k: number) =>
    (place.x(run.alongM[k] ?? 0) - x) ** 2 + ((place.y(run.asideM[k] ?? 0) - y) / 2) ** 2;
  const step = Math.max(1, Math.floor(n / 4000));
  let best = 0;
  for (let k = 0; k < n; k += step) if (away(k) < away(best)) best = k;
  const around = best;
  for (let k = Math.max(0, around - step); k < Math.min(n, around + step); k += 1)
    if (away(k) < away(best)) best = k;
  return best;
}

/** The run laid along its own line: distance to the right, sideways stretched, speed as colour, dashes off foil. */
export function UnrolledRun({ series, stretch, cursor, scale, distanceUnit }: UnrolledRunProps) {
  const run = useMemo(() => unrolledRun({ ...series, ...rangeOf(series, stretch) }), [series, stretch]);
  const latest = useRef<Place | null>(null);
  const [width, setWidth] = useState(0);

  const drawStill = useCallback(
    (surface: Surface) => {
      const place = placeOf(run, surface.width, surface.height);
      latest.current = place;
      drawScale(surface, run, place, distanceUnit);
      drawTrack(surface, series, run, { place, scale });
    },
    [run, series, scale, distanceUnit],
  );
  const drawMoving = useCallback(
    (surface: Surface, timeMs: number | null) => {
      if (timeMs === null) return;
      const nearest = Math.round((timeMs - series.startMs) / series.stepMs) - run.first;
      // The ends of a stretch lie between samples: one step outside is still its end.
      const k = Math.min(Math.max(nearest, 0), run.alongM.length - 1);
      if (k < 0 || Math.abs(k - nearest) > 1) return;
      const place = placeOf(run, surface.width, surface.height);
      const x = place.x(run.alongM[k] ?? 0);
      const { context, tokens } = surface;
      context.strokeStyle = tokens.buoy;
      context.beginPath();
      context.moveTo(x, 0);
      context.lineTo(x, surface.height - PAD.bottom);
      context.stroke();
      context.fillStyle = tokens.buoy;
      context.strokeStyle = tokens.sheet;
      context.lineWidth = 2;
      context.beginPath();
      context.arc(x, place.y(run.asideM[k] ?? 0), 6, 0, 2 * Math.PI);
      context.fill();
      context.stroke();
    },
    [run, series],
  );
  const onPointer = useCallback(
    (event: PointerEvent<HTMLDivElement>, xPx: number) => {
      if (latest.current === null || run.alongM.length === 0) return;
      if (event.type === "pointermove" && event.pointerType !== "mouse" && event.buttons === 0) return;
      const y = event.clientY - event.currentTarget.getBoundingClientRect().top;
      const k = nearestSample(run, latest.current, xPx, y);
      cursor.set(series.startMs + (run.first + k) * series.stepMs);
    },
    [run, series, cursor],
  );
  const words = wordsOf(run, placeOf(run, width, HEIGHT), distanceUnit);
  return (
    <>
      <div className="rule-ink bg-sheet border-ink border-b">
        <LayeredCanvas
          height={HEIGHT}
          label="The run, unrolled"
          description={`${words} The on-foil segments stand in the table below.`}
          cursor={cursor}
          drawStill={drawStill}
          drawMoving={drawMoving}
          onPointer={onPointer}
          onWidth={setWidth}
        />
      </div>
      <p className="text-muted pt-1 text-sm">{words}</p>
    </>
  );
}
