import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

/** Shows more in place; the browser's own, so it works without JavaScript and find-in-page opens it. */
export function Disclosure({
  summary,
  open = false,
  className,
  children,
}: {
  summary: ReactNode;
  open?: boolean;
  className?: string;
  children: ReactNode;
}) {
  return (
    <details open={open} className={classNames("group", className)}>
      <summary className="flex min-h-11 items-center gap-3 py-2 font-semibold">
        <span
          aria-hidden="true"
          className="border-ink inline-block size-2.5 shrink-0 rotate-45 border-r-2 border-b-2 group-open:-rotate-135"
        />
        {summary}
      </summary>
      <div className="pb-3 pl-6">{children}</div>
    </details>
  );
}
