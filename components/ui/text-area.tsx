import type { ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";

export function TextArea({ rows = 4, className, ...rest }: ComponentPropsWithRef<"textarea">) {
  return <textarea rows={rows} className={classNames(controlClass, className)} {...rest} />;
}
