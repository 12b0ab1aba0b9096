import type { ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";

export type NumberInputProps = Omit<ComponentPropsWithRef<"input">, "type" | "inputMode"> & {
  /** Stands behind the box and belongs to the accessible description. */
  unit?: string;
  /** Whole numbers get the plain keypad. */
  whole?: boolean;
};

/**
 * A text box with the number keypad: type="number" refuses decimal commas and changes its value when the
 * page is scrolled. Read it with parseDecimal of lib/display/parse-decimal.
 */
export function NumberInput({ unit, whole = false, className, ...rest }: NumberInputProps) {
  const unitId = unit && rest.id ? `${rest.id}-unit` : undefined;
  const described = [rest["aria-describedby"], unitId].filter(Boolean).join(" ") || undefined;
  return (
    <div className="flex items-center gap-2">
      <input
        type="text"
        inputMode={whole ? "numeric" : "decimal"}
        autoComplete="off"
        className={classNames(controlClass, "num max-w-36 text-right", className)}
        {...rest}
        aria-describedby={described}
      />
      {unit && (
        <span id={unitId} className="text-muted text-sm">
          {unit}
        </span>
      )}
    </div>
  );
}
