import type { ComponentPropsWithRef, ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";
import { fieldId } from "./field";

export type CheckboxProps = Omit<ComponentPropsWithRef<"input">, "type" | "children"> & {
  name: string;
  label: ReactNode;
  hint?: ReactNode;
  error?: string | null;
};

export function Checkbox({
  label,
  hint,
  error,
  name,
  id = fieldId(name),
  className,
  ...rest
}: CheckboxProps) {
  const hintId = hint ? `${id}-hint` : undefined;
  const errorId = error ? `${id}-error` : undefined;
  return (
    <div className={classNames(error && "border-l-4 border-buoy-text pl-3", className)}>
      {error && (
        <p id={errorId} className="text-buoy-text text-sm font-semibold">
          {error}
        </p>
      )}
      <label htmlFor={id} className="flex min-h-11 items-center gap-3 py-1">
        <input
          type="checkbox"
          id={id}
          name={name}
          aria-describedby={[hintId, errorId].filter(Boolean).join(" ") || undefined}
          aria-invalid={error ? true : undefined}
          className="size-6 shrink-0 accent-ink"
          {...rest}
        />
        <span>{label}</span>
      </label>
      {hint && (
        <p id={hintId} className="text-muted pl-9 text-sm">
          {hint}
        </p>
      )}
    </div>
  );
}
