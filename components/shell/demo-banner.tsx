/** Stands on every page of a demo, so that nobody takes invented riders for real ones. */
export function DemoBanner() {
  return (
    <aside aria-label="Demo" className="bg-shell text-ink border-ink no-print border-b text-sm">
      <p className="page py-1.5">
        Demo: riders, gear makers and tracks are invented, and a restart may empty it.
      </p>
    </aside>
  );
}
