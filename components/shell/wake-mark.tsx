/** The mark: board, mast and wing seen from ahead, and the wake they leave. Decoration beside the name. */
export function WakeMark({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 24" width="32" height="24" fill="none" aria-hidden="true" className={className}>
      <path d="M3 4.5h26" stroke="currentColor" strokeWidth="3" />
      <path d="M16 4.5v9" stroke="currentColor" strokeWidth="2.5" />
      <path d="M7 16c5-3.2 13-3.2 18 0" stroke="var(--buoy)" strokeWidth="3" />
      <path d="M11 21c3-1.8 7-1.8 10 0" stroke="var(--buoy)" strokeWidth="1.5" />
    </svg>
  );
}
