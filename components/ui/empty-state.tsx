import type { ReactNode } from "react";

/**
 * Nothing to list. first: nothing there yet, with why and the one thing to do. none: the filters leave
 * nothing, with which ones and the way to clear them. Errors are not empty: use Notice.
 */
export function EmptyState({
  kind,
  title,
  children,
  action,
}: {
  kind: "first" | "none";
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div
      role={kind === "none" ? "status" : undefined}
      className={kind === "first" ? "frame px-4 py-8 sm:px-8" : "rule-ink rule-hair px-0 py-6"}
    >
      <p className="text-lg font-semibold">{title}</p>
      {children && <div className="text-muted mt-1 max-w-prose">{children}</div>}
      {action && <div className="mt-4 flex flex-wrap gap-3">{action}</div>}
    </div>
  );
}
