import { classNames } from "@/lib/display/class-names";

/** A bar of ink that fills; `share` is 0 to 1, or null while the end is not known. */
export function Progress({
  label,
  share,
  className,
}: {
  label: string;
  share: number | null;
  className?: string;
}) {
  const percent = share === null ? null : Math.round(Math.min(1, Math.max(0, share)) * 100);
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent ?? undefined}
      aria-valuetext={percent === null ? "working" : `${percent} %`}
      className={classNames("bg-hairline h-3 w-full overflow-hidden", className)}
    >
      <div
        className={classNames("bg-ink h-full", percent === null && "w-1/3 animate-pulse")}
        style={percent === null ? undefined : { width: `${percent}%` }}
      />
    </div>
  );
}
