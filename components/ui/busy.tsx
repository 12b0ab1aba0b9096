/** Words while something is under way, spoken politely. */
export function Busy({ children = "Working" }: { children?: string }) {
  return (
    <p role="status" className="text-muted inline-flex items-center gap-3">
      <span aria-hidden="true" className="bg-buoy inline-block h-3 w-3 animate-pulse" />
      {children}
    </p>
  );
}
