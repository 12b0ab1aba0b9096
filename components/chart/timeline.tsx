"use client";

import { useCallback, useEffect, useLayoutEffect, useMemo, useRef, useState, type PointerEvent } from "react";
import uPlot from "uplot";
import "uplot/dist/uPlot.min.css";
import { themeTokens } from "@/lib/display/theme-tokens";
import { formatTime } from "@/lib/display/format-time";
import { speedWithUnit } from "@/lib/display/format-speed";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";
import type { SpeedUnit } from "@/lib/units/speed";
import { LayeredCanvas, useDrawnTheme, type Surface } from "./layered-canvas";
import { PLOT_LEFT, PLOT_RIGHT, showStretch, speedColumns, speedPlotOptions } from "./speed-plot";
import { brushedStretch, pxOfTime, timeAtPx, type TimeAxis } from "./time-axis";
import { drawStrips, stripsHeight, type Strips } from "./timeline-strips";

const PLOT_HEIGHT = 220;

export type TimelineProps = {
  strips: Strips;
  /** What is in view; the whole session or a stretch zoomed into. */
  view: Stretch;
  /** The brushed stretch, tinted; null for none. */
  stretch: Stretch | null;
  cursor: TimeCursor;
  speedUnit: SpeedUnit;
  timeZone: string;
  /** Whether a finger brushes instead of moving the cursor. */
  touchBrushes: boolean;
  onBrush: (stretch: Stretch) => void;
};

function axisOf(view: Stretch, width: number): TimeAxis {
  return { ...view, leftPx: PLOT_LEFT, rightPx: Math.max(PLOT_LEFT + 1, width - PLOT_RIGHT) };
}

/** The speed chart itself; made anew when the data, the width or the theme changes. */
function SpeedPlot({
  strips,
  view,
  speedUnit,
  timeZone,
  width,
}: Pick<TimelineProps, "strips" | "view" | "speedUnit" | "timeZone"> & { width: number }) {
  const host = useRef<HTMLDivElement>(null);
  const plot = useRef<uPlot | null>(null);
  const theme = useDrawnTheme();
  const columns = useMemo(() => speedColumns(strips.series, speedUnit), [strips.series, speedUnit]);
  const shown = useRef(view);
  useEffect(() => {
    shown.current = view;
    if (plot.current !== null) showStretch(plot.current, view);
  }, [view]);
  useLayoutEffect(() => {
    if (host.current === null || width === 0) return;
    const tokens = themeTokens(theme);
    const made = new uPlot(
      speedPlotOptions({ width, height: PLOT_HEIGHT, timeZone, tokens }),
      columns,
      host.current,
    );
    showStretch(made, shown.current);
    plot.current = made;
    return () => {
      plot.current = null;
      made.destroy();
    };
  }, [columns, width, timeZone, theme]);
  return <div ref={host} aria-hidden="true" className="absolute inset-x-0 top-0" />;
}

function drawCursor(surface: Surface, axis: TimeAxis, timeMs: number, text: string): void {
  const { context, tokens, height } = surface;
  const x = pxOfTime(axis, timeMs);
  if (x < axis.leftPx - 1 || x > axis.rightPx + 1) return;
  context.strokeStyle = tokens.buoy;
  context.lineWidth = 1.5;
  context.beginPath();
  context.moveTo(x, 0);
  context.lineTo(x, height);
  context.stroke();
  context.font = '12px "Spline Sans Mono", ui-monospace, monospace';
  const wide = context.measureText(text).width + 12;
  const left = x + wide > surface.width ? x - wide : x;
  context.fillStyle = tokens.buoyText;
  context.fillRect(left, 0, wide, 20);
  context.fillStyle = tokens.paper;
  context.textAlign = "left";
  context.textBaseline = "middle";
  context.fillText(text, left + 6, 11);
}

function drawBrush(surface: Surface, axis: TimeAxis, stretch: Stretch): void {
  const { context, tokens, height } = surface;
  const from = Math.max(axis.leftPx, pxOfTime(axis, stretch.startMs));
  const to = Math.min(axis.rightPx, pxOfTime(axis, stretch.endMs));
  if (to <= from) return;
  context.fillStyle = `${tokens.buoy}22`;
  context.fillRect(from, 0, to - from, height);
  context.strokeStyle = tokens.buoy;
  context.lineWidth = 1;
  context.strokeRect(from + 0.5, 0.5, to - from - 1, height - 1);
}

/** Speed with its standard error, on-foil blocks, the comb of bump rides, gear bars, heart rate; one time axis. */
export function Timeline(props: TimelineProps) {
  const { strips, view, stretch, cursor, speedUnit, timeZone, touchBrushes, onBrush } = props;
  const [width, setWidth] = useState(0);
  const drag = useRef<{ from: number; to: number } | null>(null);
  const height = PLOT_HEIGHT + stripsHeight(strips) + 4;
  const { series } = strips;

  const drawStill = useCallback(
    (surface: Surface) => {
      const axis = axisOf(view, surface.width);
      drawStrips(surface, axis, strips, PLOT_HEIGHT + 4);
      // Zoomed into, the stretch is all there is to see: a tint would only dull it.
      const fills = stretch !== null && stretch.startMs <= view.startMs && stretch.endMs >= view.endMs;
      if (stretch !== null && !fills) drawBrush(surface, axis, stretch);
    },
    [view, strips, stretch],
  );
  const drawMoving = useCallback(
    (surface: Surface, timeMs: number | null) => {
      const axis = axisOf(view, surface.width);
      const brushed = drag.current === null ? null : brushedStretch(axis, drag.current.from, drag.current.to);
      if (brushed !== null) drawBrush(surface, axis, brushed);
      if (timeMs === null) return;
      const sample = Math.round((timeMs - series.startMs) / series.stepMs);
      const speed = speedWithUnit(series.speedMps[sample] ?? null, speedUnit);
      drawCursor(surface, axis, timeMs, `${formatTime(timeMs, timeZone, "seconds")} ${speed}`);
    },
    [view, series, speedUnit, timeZone],
  );
  const onPointer = useCallback(
    (event: PointerEvent<HTMLDivElement>, xPx: number, wide: number) => {
      const axis = axisOf(view, wide);
      const brushes = event.pointerType === "mouse" || touchBrushes;
      if (event.type === "pointerdown" && event.button === 0) {
        if (brushes) drag.current = { from: xPx, to: xPx };
        event.currentTarget.setPointerCapture(event.pointerId);
      } else if (drag.current !== null) {
        drag.current.to = xPx;
        if (event.type === "pointerup") {
          const brushed = brushedStretch(axis, drag.current.from, xPx);
          drag.current = null;
          if (brushed !== null) onBrush(brushed);
        } else if (event.type === "pointercancel") drag.current = null;
      }
      if (event.type !== "pointercancel") cursor.set(Math.round(timeAtPx(axis, xPx)));
    },
    [view, touchBrushes, onBrush, cursor],
  );
  return (
    <div className="rule-ink relative border-b">
      <SpeedPlot strips={strips} view={view} speedUnit={speedUnit} timeZone={timeZone} width={width} />
      <LayeredCanvas
        height={height}
        label="Timeline"
        description={`Speed over time with its standard error, ${strips.segments.length} on-foil segments, ${strips.bumpRides.length} bump rides. The tables below say the same.`}
        cursor={cursor}
        drawStill={drawStill}
        drawMoving={drawMoving}
        onPointer={onPointer}
        onWidth={setWidth}
      />
    </div>
  );
}
