import { classNames } from "@/lib/display/class-names";

/** A hairline block that holds a place so that nothing jumps; silent for screen readers. */
export function Skeleton({ className }: { className?: string }) {
  return <div aria-hidden="true" className={classNames("border-hairline bg-sheet border", className)} />;
}
