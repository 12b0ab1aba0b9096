import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

/** What a control needs so that label, hint and error belong to it. */
export type FieldControl = {
  id: string;
  name: string;
  "aria-describedby": string | undefined;
  "aria-invalid": true | undefined;
};

export type FieldProps = {
  label: ReactNode;
  name: string;
  /** Defaults to "field-<name>", which is also where ErrorSummary links to. */
  id?: string;
  hint?: ReactNode;
  error?: string | null;
  optional?: boolean;
  className?: string;
};

/** Where an error in the summary leads. */
export const fieldId = (name: string): string => `field-${name}`;

/** Label, hint and error round one control; the control comes as a function of its wiring. */
export function Field(props: FieldProps & { children: (control: FieldControl) => ReactNode }) {
  const { label, name, id = fieldId(name), hint, error, optional = false, className, children } = props;
  const hintId = hint ? `${id}-hint` : undefined;
  const errorId = error ? `${id}-error` : undefined;
  return (
    <div
      className={classNames(
        "flex min-w-0 flex-col gap-1",
        error && "border-l-4 border-buoy-text pl-3",
        className,
      )}
    >
      <label htmlFor={id} className="font-semibold">
        {label}
        {optional && <span className="text-muted font-normal"> (optional)</span>}
      </label>
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
      {children({
        id,
        name,
        "aria-describedby": [hintId, errorId].filter(Boolean).join(" ") || undefined,
        "aria-invalid": error ? true : undefined,
      })}
    </div>
  );
}
