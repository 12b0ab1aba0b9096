import type { ComponentPropsWithRef, ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

export type IconButtonProps = Omit<ComponentPropsWithRef<"button">, "children" | "aria-label"> & {
  /** The words a screen reader says and the tooltip shows. */
  label: string;
  icon: ReactNode;
};

/** For map and chart controls only, where words do not fit; 44 px square. */
export function IconButton({ label, icon, type = "button", className, ...rest }: IconButtonProps) {
  return (
    <button
      type={type}
      aria-label={label}
      title={label}
      className={classNames(
        "frame text-ink hover:bg-kelp no-print inline-flex size-11 items-center justify-center disabled:opacity-60",
        className,
      )}
      {...rest}
    >
      <span aria-hidden="true">{icon}</span>
    </button>
  );
}
