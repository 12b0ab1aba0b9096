import { useMemo } from "react";
import { type SpeedScale, speedRamp } from "@/lib/display/speed-ramp";
import type { SpeedSeries } from "@/lib/track/speed-series";
import type { DistanceUnit } from "@/lib/units/length";
import { bandWidthPx } from "./band-width";
import type { Place } from "./place";
import { scaleBarLength } from "./scale-bar-length";
import { staticPaths, type StaticPaths } from "./static-paths";
import { OFF_FOIL } from "./track-runs";
import { trackShape } from "./track-shape";

export type TrackMapStaticProps = {
  series: SpeedSeries;
  scale: SpeedScale;
  widthPx: number;
  heightPx: number;
  /** What it shows, for those who cannot see it. */
  label: string;
  /** Scale bar in this unit, north mark and places; left out in a list's small picture. */
  distanceUnit?: DistanceUnit;
  places?: readonly Place[];
  className?: string;
};

/** Kept free at the bottom for the scale bar. */
const STRIP_PX = 28;

/** The track as a drawing without a map under it: for paper, for browsers that draw no maps, for lists. */
export function TrackMapStatic(props: TrackMapStaticProps) {
  const { series, scale, widthPx, heightPx, label, distanceUnit, places = [], className } = props;
  const drawing = useMemo(
    () =>
      staticPaths(trackShape(series), scale, {
        widthPx,
        heightPx: distanceUnit ? heightPx - STRIP_PX : heightPx,
        marginPx: distanceUnit ? 32 : 5,
      }),
    [series, scale, widthPx, heightPx, distanceUnit],
  );
  if (drawing === null) return <p className={className}>There is no track on the water to draw.</p>;
  const thin = distanceUnit ? 1 : 0.6;
  return (
    <svg viewBox={`0 0 ${widthPx} ${heightPx}`} role="img" aria-label={label} className={className}>
      {drawing.paths.map(({ kind, d }) => (
        <TrackPath key={kind} kind={kind} d={d} thin={thin} />
      ))}
      <circle
        cx={drawing.first[0]}
        cy={drawing.first[1]}
        r={4 * thin}
        className="fill-sheet stroke-ink"
        strokeWidth={1.5}
      />
      <circle
        cx={drawing.last[0]}
        cy={drawing.last[1]}
        r={4 * thin}
        className="fill-ink stroke-ink"
        strokeWidth={1.5}
      />
      {distanceUnit && (
        <Furniture drawing={drawing} unit={distanceUnit} heightPx={heightPx} widthPx={widthPx} />
      )}
      {places.map((place) => {
        const [x, y] = drawing.place(place.lon, place.lat);
        return (
          <g key={`${place.name} ${x} ${y}`}>
            <rect x={x - 2} y={y - 2} width={4} height={4} className="fill-ink" />
            <text
              x={x}
              y={y + 13}
              textAnchor="middle"
              className="fill-ink stroke-sheet text-[11px] font-semibold"
              strokeWidth={3}
              paintOrder="stroke"
            >
              {place.name}
            </text>
          </g>
        );
      })}
    </svg>
  );
}

function TrackPath({ kind, d, thin }: { kind: number; d: string; thin: number }) {
  if (kind === OFF_FOIL) {
    return (
      <path d={d} fill="none" className="stroke-muted" strokeWidth={1.25 * thin} strokeDasharray="3 3" />
    );
  }
  const line = {
    d,
    fill: "none",
    strokeWidth: bandWidthPx(kind) * thin,
    strokeLinecap: "round",
    strokeLinejoin: "round",
  } as const;
  return (
    <>
      <path {...line} stroke={speedRamp("light")[kind]} className="dark:hidden print:inline" />
      <path {...line} stroke={speedRamp("dark")[kind]} className="hidden dark:inline print:hidden" />
    </>
  );
}

type FurnitureProps = { drawing: StaticPaths; unit: DistanceUnit; widthPx: number; heightPx: number };

function Furniture({ drawing, unit, widthPx, heightPx }: FurnitureProps) {
  const bar = scaleBarLength(drawing.metresPerPx, 120, unit);
  return (
    <g aria-hidden="true">
      <path d={`M${widthPx - 20} 6l5 12l-5 -2.5l-5 2.5z`} className="fill-ink" />
      <text x={widthPx - 20} y={31} textAnchor="middle" className="fill-ink text-[11px] font-semibold">
        N
      </text>
      {bar && (
        <>
          <path d={`M8 ${heightPx - 12}v6h${bar.widthPx}v-6`} fill="none" className="stroke-ink" />
          <text x={8} y={heightPx - 15} className="fill-ink font-mono text-[11px]">
            {bar.label}
          </text>
        </>
      )}
    </g>
  );
}
