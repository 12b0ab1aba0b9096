import type { ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";

/** The browser's own date box; its value is always "2025-06-14" whatever the screen shows. */
export function DateInput({
  type = "date",
  className,
  ...rest
}: Omit<ComponentPropsWithRef<"input">, "type"> & { type?: "date" | "time" | "datetime-local" }) {
  return <input type={type} className={classNames(controlClass, "num max-w-56", className)} {...rest} />;
}
