import { bearingInWords } from "@/lib/display/format-bearing";

export type WindRoseProps = { windFromDeg: number | null };

/** North, and the wind as an arrow that points the way it blows. The map never turns, so north is up. */
export function WindRose({ windFromDeg }: WindRoseProps) {
  const words =
    windFromDeg === null ? "North is up." : `North is up. Wind from ${bearingInWords(windFromDeg)}.`;
  return (
    <svg
      viewBox="0 0 56 68"
      role="img"
      aria-label={words}
      className="pointer-events-none absolute top-2 right-2 h-[68px] w-14"
    >
      <path d="M28 2 L33 13 L28 10.5 L23 13 Z" className="fill-ink" />
      <text
        x="28"
        y="24"
        textAnchor="middle"
        className="fill-ink text-[11px] font-semibold [paint-order:stroke]"
        stroke="var(--water)"
        strokeWidth="3"
      >
        N
      </text>
      {windFromDeg !== null && (
        <g transform={`rotate(${windFromDeg} 28 46)`}>
          <circle cx="28" cy="46" r="19" className="fill-sheet stroke-ink" />
          <path
            d="M28 32 V58 M22.5 51.5 L28 59 L33.5 51.5"
            fill="none"
            className="stroke-ink"
            strokeWidth="1.75"
          />
        </g>
      )}
    </svg>
  );
}
