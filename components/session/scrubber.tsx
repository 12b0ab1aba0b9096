"use client";

import { useEffect, useRef, type KeyboardEvent } from "react";
import { PLOT_LEFT, PLOT_RIGHT } from "@/components/chart/speed-plot";
import { durationInWords } from "@/lib/display/format-duration";
import { formatTime } from "@/lib/display/format-time";
import { speedWithUnit } from "@/lib/display/format-speed";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";
import type { SpeedUnit } from "@/lib/units/speed";

const PAGE_MS = 30_000;

export type ScrubberProps = {
  series: SpeedSeries;
  view: Stretch;
  /** Where the session begins: the time "in" counts from here, also when a stretch is zoomed into. */
  fromMs: number;
  cursor: TimeCursor;
  speedUnit: SpeedUnit;
  timeZone: string;
};

function textAt(props: ScrubberProps, timeMs: number): string {
  const { series, fromMs, speedUnit, timeZone } = props;
  const speed = series.speedMps[Math.round((timeMs - series.startMs) / series.stepMs)] ?? null;
  const since = durationInWords(Math.max(0, timeMs - fromMs) / 1000);
  return `${formatTime(timeMs, timeZone, "seconds")}, ${since} in, ${speedWithUnit(speed, speedUnit)}`;
}

/**
 * Moves the cursor by keyboard or thumb: arrows a second, page keys half a minute, Home and End to the ends. The
 * slider follows the cursor wherever it is moved from, without rendering the page.
 */
export function Scrubber(props: ScrubberProps) {
  const { view, cursor } = props;
  const slider = useRef<HTMLInputElement>(null);
  const readout = useRef<HTMLOutputElement>(null);
  const latest = useRef(props);
  useEffect(() => {
    latest.current = props;
  });
  useEffect(() => {
    let frame = 0;
    const show = () => {
      frame = 0;
      const timeMs = cursor.get() ?? view.startMs;
      const text = textAt(latest.current, timeMs);
      if (slider.current !== null) {
        slider.current.value = String(Math.round(timeMs / 1000) * 1000);
        slider.current.setAttribute("aria-valuetext", text);
      }
      if (readout.current !== null) readout.current.textContent = text;
    };
    show();
    const end = cursor.subscribe(() => {
      if (frame === 0) frame = requestAnimationFrame(show);
    });
    return () => {
      end();
      cancelAnimationFrame(frame);
    };
  }, [cursor, view]);

  const move = (toMs: number) => cursor.set(Math.min(view.endMs, Math.max(view.startMs, toMs)));
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    const now = cursor.get() ?? view.startMs;
    const targets: Readonly<Record<string, number>> = {
      ArrowRight: now + 1000,
      ArrowUp: now + 1000,
      ArrowLeft: now - 1000,
      ArrowDown: now - 1000,
      PageUp: now + PAGE_MS,
      PageDown: now - PAGE_MS,
      Home: view.startMs,
      End: view.endMs,
    };
    const target = targets[event.key];
    if (target === undefined) return;
    event.preventDefault();
    move(target);
  };
  return (
    <div className="no-print flex flex-col gap-1">
      <label htmlFor="scrubber" className="sr-only">
        Moment of the session
      </label>
      <input
        ref={slider}
        id="scrubber"
        type="range"
        // The thumb runs under the time axis of the timeline.
        style={{ marginLeft: PLOT_LEFT - 8, width: `calc(100% - ${PLOT_LEFT + PLOT_RIGHT - 16}px)` }}
        className="h-11 accent-buoy sm:h-8"
        min={view.startMs}
        max={view.endMs}
        step={1000}
        defaultValue={view.startMs}
        onKeyDown={onKeyDown}
        onChange={(event) => move(Number(event.currentTarget.value))}
      />
      <output ref={readout} htmlFor="scrubber" className="num pb-4 text-sm" aria-live="off" />
    </div>
  );
}
