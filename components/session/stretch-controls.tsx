"use client";

import { useEffect, useRef, useState, type FormEvent } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { TextInput } from "@/components/ui/text-input";
import { formatTime } from "@/lib/display/format-time";
import { parseLocalTime } from "@/lib/display/parse-local-time";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";

export type StretchControlsProps = {
  whole: Stretch;
  stretch: Stretch | null;
  isZoomed: boolean;
  touchBrushes: boolean;
  timeZone: string;
  cursor: TimeCursor;
  onStretch: (stretch: Stretch | null) => void;
  onZoom: (zoomed: boolean) => void;
  onTouchBrushes: (on: boolean) => void;
};

/**
 * Brushing without a mouse: times to type, the cursor's place as an end, a finger that brushes; zoom and back. The
 * fields follow the stretch wherever it is brushed from.
 */
export function StretchControls(props: StretchControlsProps) {
  const { whole, stretch, isZoomed, touchBrushes, timeZone, cursor, onStretch, onZoom, onTouchBrushes } =
    props;
  const shown = stretch ?? whole;
  const from = useRef<HTMLInputElement>(null);
  const to = useRef<HTMLInputElement>(null);
  const submitButton = useRef<HTMLButtonElement>(null);
  const [problem, setProblem] = useState("");
  useEffect(() => {
    if (from.current !== null) from.current.value = formatTime(shown.startMs, timeZone, "seconds");
    if (to.current !== null) to.current.value = formatTime(shown.endMs, timeZone, "seconds");
  }, [shown.startMs, shown.endMs, timeZone]);

  const brush = (startMs: number | null, endMs: number | null) => {
    if (startMs === null || endMs === null) {
      setProblem("Enter times as hours, minutes and seconds, such as 13:08:30.");
      return;
    }
    const bounded = { startMs: Math.max(whole.startMs, startMs), endMs: Math.min(whole.endMs, endMs) };
    if (bounded.endMs - bounded.startMs < 1000) {
      setProblem("The stretch must end after it starts, inside the session.");
      return;
    }
    setProblem("");
    onStretch(bounded);
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    brush(
      parseLocalTime(from.current?.value ?? "", shown.startMs, timeZone),
      parseLocalTime(to.current?.value ?? "", shown.endMs, timeZone),
    );
  };
  const here = () => cursor.get() ?? shown.startMs;
  return (
    <form onSubmit={submit} className="no-print flex flex-wrap items-end gap-3" noValidate>
      <Field label="From" name="stretch-from" error={problem === "" ? null : problem}>
        {(control) => (
          <TextInput
            {...control}
            className="num max-w-32"
            autoComplete="off"
            ref={from}
            defaultValue={formatTime(shown.startMs, timeZone, "seconds")}
          />
        )}
      </Field>
      <Field label="To" name="stretch-to">
        {(control) => (
          <TextInput
            {...control}
            className="num max-w-32"
            autoComplete="off"
            ref={to}
            defaultValue={formatTime(shown.endMs, timeZone, "seconds")}
          />
        )}
      </Field>
      <Button type="submit" ref={submitButton}>
        Work out this stretch
      </Button>
      <Button look="quiet" onClick={() => brush(here(), Math.max(shown.endMs, here() + 10_000))}>
        Start at the cursor
      </Button>
      <Button look="quiet" onClick={() => brush(Math.min(shown.startMs, here() - 10_000), here())}>
        End at the cursor
      </Button>
      <span className="hidden any-pointer-coarse:contents">
        <Button look="quiet" aria-pressed={touchBrushes} onClick={() => onTouchBrushes(!touchBrushes)}>
          Brush with a finger
        </Button>
      </span>
      {stretch !== null && (
        <>
          <Button onClick={() => onZoom(!isZoomed)}>{isZoomed ? "Zoom out" : "Zoom to the stretch"}</Button>
          <Button
            onClick={() => {
              // The button goes away with the stretch: the focus stays beside it.
              submitButton.current?.focus();
              onStretch(null);
            }}
          >
            Whole session
          </Button>
        </>
      )}
    </form>
  );
}
