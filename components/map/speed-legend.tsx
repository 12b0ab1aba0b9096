import { formatNumber } from "@/lib/display/format-number";
import { SPEED_BANDS, speedBandEdges, speedRamp, type SpeedScale } from "@/lib/display/speed-ramp";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";
import { bandWidthPx } from "./band-width";

export type SpeedLegendProps = { scale: SpeedScale; unit: SpeedUnit };

/** What the colours of a track say: speed bands, slow and thin to fast and wide, and the dashes off foil. */
export function SpeedLegend({ scale, unit }: SpeedLegendProps) {
  const edges = speedBandEdges(scale);
  const whole = edges.every((edge) => Math.abs(speedFromMps(edge, unit) % 1) < 1e-6);
  const figure = (index: number) =>
    formatNumber(speedFromMps(edges[index] ?? Number.NaN, unit), whole ? 0 : 1);
  const light = speedRamp("light");
  const dark = speedRamp("dark");
  return (
    <div className="flex flex-wrap items-end gap-x-6 gap-y-1 text-xs">
      <p className="sr-only">
        {`Colour and width are speed, from ${figure(0)} to ${figure(SPEED_BANDS)} ${unit} in ${SPEED_BANDS} bands; dashes are off foil.`}
      </p>
      <div aria-hidden="true" className="w-56 max-w-full">
        <svg viewBox="0 0 224 8" className="block w-full" preserveAspectRatio="none">
          {Array.from({ length: SPEED_BANDS }, (_, band) => (
            <g key={band} strokeWidth={bandWidthPx(band) + 1}>
              <line
                x1={band * 28}
                x2={band * 28 + 27}
                y1="4"
                y2="4"
                stroke={light[band]}
                className="dark:hidden print:inline"
              />
              <line
                x1={band * 28}
                x2={band * 28 + 27}
                y1="4"
                y2="4"
                stroke={dark[band]}
                className="hidden dark:inline print:hidden"
              />
            </g>
          ))}
        </svg>
        <div className="num flex justify-between">
          <span>{figure(0)}</span>
          <span>{figure(SPEED_BANDS / 2)}</span>
          <span>
            {figure(SPEED_BANDS)} <span className="unit">{unit}</span>
          </span>
        </div>
      </div>
      <div aria-hidden="true" className="text-muted flex items-center gap-2">
        <svg viewBox="0 0 32 8" className="stroke-muted w-8">
          <line x1="0" x2="32" y1="4" y2="4" strokeWidth="1.5" strokeDasharray="4 4" />
        </svg>
        off foil
      </div>
      <div aria-hidden="true" className="text-muted flex items-center gap-2">
        <svg viewBox="0 0 12 12" className="stroke-ink fill-sheet w-3">
          <circle cx="6" cy="6" r="4.5" strokeWidth="2" />
        </svg>
        start
        <svg viewBox="0 0 12 12" className="stroke-ink fill-ink w-3">
          <circle cx="6" cy="6" r="4.5" strokeWidth="2" />
        </svg>
        end
      </div>
    </div>
  );
}
