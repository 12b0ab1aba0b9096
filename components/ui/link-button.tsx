import Link from "next/link";
import type { ComponentProps } from "react";
import { buttonClass, type ButtonLook, type ButtonSize } from "./button-class";

export type LinkButtonProps = ComponentProps<typeof Link> & { look?: ButtonLook; size?: ButtonSize };

/** Goes somewhere; looks like a button where going there is the next thing to do. */
export function LinkButton({ look = "plain", size = "normal", className, ...rest }: LinkButtonProps) {
  return <Link className={buttonClass(look, size, className)} {...rest} />;
}
