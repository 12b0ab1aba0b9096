import type { ComponentPropsWithRef, ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";
import { FieldSet, type FieldSetProps } from "./field-set";

export type RadioOption = { readonly value: string; readonly label: ReactNode; readonly hint?: ReactNode };

export type RadioGroupProps = Omit<FieldSetProps, "children" | "name"> & {
  name: string;
  options: readonly RadioOption[];
  defaultValue?: string;
  /** Side by side where the width allows. */
  inline?: boolean;
  onChange?: ComponentPropsWithRef<"input">["onChange"];
};

export function RadioGroup({
  name,
  options,
  defaultValue,
  inline = false,
  onChange,
  ...set
}: RadioGroupProps) {
  return (
    <FieldSet name={name} {...set}>
      <div className={classNames("flex", inline ? "flex-wrap gap-x-6" : "flex-col")}>
        {options.map((option) => {
          const id = `field-${name}-${option.value}`;
          return (
            <div key={option.value}>
              <label htmlFor={id} className="flex min-h-11 items-center gap-3 py-1">
                <input
                  type="radio"
                  id={id}
                  name={name}
                  value={option.value}
                  defaultChecked={option.value === defaultValue}
                  aria-describedby={option.hint ? `${id}-hint` : undefined}
                  onChange={onChange}
                  className="size-6 shrink-0 accent-ink"
                />
                <span>{option.label}</span>
              </label>
              {option.hint && (
                <p id={`${id}-hint`} className="text-muted pl-9 text-sm">
                  {option.hint}
                </p>
              )}
            </div>
          );
        })}
      </div>
    </FieldSet>
  );
}
