import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

export type NoticeProps = {
  /** done and info speak up politely (role=status); problem at once (role=alert); caution is static. */
  kind?: "info" | "done" | "problem" | "caution";
  title?: ReactNode;
  children?: ReactNode;
  className?: string;
};

const EDGES = {
  info: "border-l-ink",
  done: "border-l-swell",
  problem: "border-l-buoy-text",
  caution: "border-l-buoy",
} as const;

const ROLES = { info: "status", done: "status", problem: "alert", caution: "note" } as const;

export function Notice({ kind = "info", title, children, className }: NoticeProps) {
  return (
    <div
      role={ROLES[kind]}
      className={classNames("bg-sheet border-ink border border-l-4 p-4", EDGES[kind], className)}
    >
      {title && <p className="font-semibold">{title}</p>}
      {children && <div className={classNames(title ? "mt-1" : null)}>{children}</div>}
    </div>
  );
}
