import type { ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";

export type SelectOption = { readonly value: string; readonly label: string; readonly disabled?: boolean };

export type SelectProps = ComponentPropsWithRef<"select"> & {
  options?: readonly SelectOption[];
  /** An empty first choice, for example "Any front wing". */
  empty?: string;
};

/** The native list: works by keyboard, by thumb and without JavaScript. Children (optgroup) go after options. */
export function Select({ options = [], empty, className, children, ...rest }: SelectProps) {
  return (
    <select className={classNames(controlClass, className)} {...rest}>
      {empty !== undefined && <option value="">{empty}</option>}
      {options.map((option) => (
        <option key={option.value} value={option.value} disabled={option.disabled}>
          {option.label}
        </option>
      ))}
      {children}
    </select>
  );
}
