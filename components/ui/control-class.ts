/** The look of every control that takes text: 1 px ink, sheet behind, 44 px high, 16 px type (no zoom on phones). */
export const controlClass =
  "border border-ink bg-sheet text-ink min-h-11 w-full min-w-0 px-3 py-2 text-base placeholder:text-muted aria-invalid:border-buoy-text aria-invalid:border-2 disabled:opacity-60";
