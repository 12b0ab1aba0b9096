"use client";

import { useEffect, useRef, type ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

/**
 * A button that drops a list of links or small forms under itself. It is a disclosure, not an ARIA menu: its
 * contents are links, reached by Tab. Escape, a press outside and following a link close it.
 */
export function Menu({
  label,
  align = "end",
  className,
  children,
}: {
  label: ReactNode;
  align?: "start" | "end";
  className?: string;
  children: ReactNode;
}) {
  const box = useRef<HTMLDetailsElement>(null);
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const outside = (event: Event) => {
      if (element.open && event.target instanceof Node && !element.contains(event.target))
        element.open = false;
    };
    const key = (event: KeyboardEvent) => {
      if (event.key !== "Escape" || !element.open) return;
      element.open = false;
      element.querySelector("summary")?.focus();
    };
    const followed = (event: MouseEvent) => {
      if (event.target instanceof Element && event.target.closest("a")) element.open = false;
    };
    document.addEventListener("pointerdown", outside);
    document.addEventListener("focusin", outside);
    element.addEventListener("keydown", key);
    element.addEventListener("click", followed);
    return () => {
      document.removeEventListener("pointerdown", outside);
      document.removeEventListener("focusin", outside);
      element.removeEventListener("keydown", key);
      element.removeEventListener("click", followed);
    };
  }, []);
  return (
    <details ref={box} className={classNames("relative", className)}>
      <summary className="mark-current flex min-h-11 items-center">{label}</summary>
      <div
        className={classNames(
          "border-ink bg-paper absolute z-30 mt-2 flex w-max max-w-[calc(100vw-2rem)] min-w-48 flex-col border p-2",
          align === "end" ? "right-0" : "left-0",
        )}
      >
        {children}
      </div>
    </details>
  );
}
