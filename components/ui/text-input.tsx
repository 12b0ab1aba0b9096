import type { ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";

export type TextInputProps = ComponentPropsWithRef<"input">;

export function TextInput({ type = "text", className, ...rest }: TextInputProps) {
  return <input type={type} className={classNames(controlClass, className)} {...rest} />;
}
