"use client";

import { useEffect, useRef } from "react";
import { fieldId } from "./field";

export type SummaryError = {
  /** The field's name; null for an error that belongs to no field. */
  readonly name: string | null;
  /** The same words as beside the field. */
  readonly text: string;
};

/** Above a form that was refused: takes the focus, names every problem, leads to its field. */
export function ErrorSummary({
  errors,
  title = "There is a problem",
}: {
  errors: readonly SummaryError[];
  title?: string;
}) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    if (errors.length > 0) box.current?.focus();
  }, [errors]);
  if (errors.length === 0) return null;
  return (
    <div
      ref={box}
      role="alert"
      tabIndex={-1}
      aria-labelledby="error-summary-title"
      className="border-2 border-buoy-text bg-sheet p-4"
    >
      <h2 id="error-summary-title" className="text-lg">
        {title}
      </h2>
      <ul className="mt-2 flex flex-col gap-1">
        {errors.map((error) => (
          <li key={`${error.name}-${error.text}`} className="text-buoy-text font-semibold">
            {error.name === null ? (
              error.text
            ) : (
              <a
                href={`#${fieldId(error.name)}`}
                className="inline-block min-h-6 underline underline-offset-4"
                onClick={(event) => {
                  const target = document.getElementById(fieldId(error.name ?? ""));
                  if (!target) return;
                  event.preventDefault();
                  target.focus();
                  target.scrollIntoView({ block: "center" });
                }}
              >
                {error.text}
              </a>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
