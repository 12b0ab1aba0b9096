import type { ComponentPropsWithRef } from "react";
import { buttonClass, type ButtonLook, type ButtonSize } from "./button-class";

export type ButtonProps = ComponentPropsWithRef<"button"> & { look?: ButtonLook; size?: ButtonSize };

export function Button({
  look = "plain",
  size = "normal",
  type = "button",
  className,
  ...rest
}: ButtonProps) {
  return <button type={type} className={buttonClass(look, size, className)} {...rest} />;
}
