import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";
import { fieldId } from "./field";

export type FieldSetProps = {
  legend: ReactNode;
  /** With a name, an error in the summary leads here ("field-<name>"). */
  name?: string;
  id?: string;
  hint?: ReactNode;
  error?: string | null;
  className?: string;
  children: ReactNode;
};

/** Controls that belong together under one question. */
export function FieldSet(props: FieldSetProps) {
  const { legend, name, id = name ? fieldId(name) : undefined, hint, error, className, children } = props;
  const hintId = hint && id ? `${id}-hint` : undefined;
  const errorId = error && id ? `${id}-error` : undefined;
  return (
    <fieldset
      id={id}
      tabIndex={error ? -1 : undefined}
      aria-describedby={[hintId, errorId].filter(Boolean).join(" ") || undefined}
      className={classNames("min-w-0", error && "border-l-4 border-buoy-text pl-3", className)}
    >
      <legend className="font-semibold">{legend}</legend>
      {hint && (
        <p id={hintId} className="text-muted text-sm">
          {hint}
        </p>
      )}
      {error && (
        <p id={errorId} className="text-buoy-text text-sm font-semibold">
          {error}
        </p>
      )}
      <div className="mt-2">{children}</div>
    </fieldset>
  );
}
