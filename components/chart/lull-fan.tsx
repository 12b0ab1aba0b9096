"use client";

import { useId, useMemo } from "react";
import { formatNumber } from "@/lib/display/format-number";
import { niceTicks } from "@/lib/display/ticks";
import type { GlideFigures, Lull } from "@/lib/analysis/analysis";
import type { SpeedSeries } from "@/lib/track/speed-series";

const WIDTH = 640;
const HEIGHT = 260;
const PAD = { left: 46, right: 96, top: 14, bottom: 34 };
/** Standard gravity, m/s². Source: 3rd CGPM (1901). */
const G = 9.80665;
/** More lines than this make a blot; the rest is left out of the drawing, never out of the figure. */
const LINES_MAX = 400;

type Axes = { readonly x: (m: number) => number; readonly y: (m: number) => number };

/** The line of one lull: energy height lost against distance from its peak, as an SVG path. */
function lullPath(series: SpeedSeries, lull: Lull, { x, y }: Axes): string {
  const first = Math.max(0, Math.round((lull.startMs - series.startMs) / series.stepMs));
  const last = Math.min(series.count - 1, Math.round((lull.endMs - series.startMs) / series.stepMs));
  const height = (i: number) => (series.speedMps[i] ?? 0) ** 2 / (2 * G);
  const step = Math.max(1, Math.floor((last - first) / 24));
  const points: string[] = [];
  for (let i = first; i <= last; i += step) {
    const way = (series.distanceM[i] ?? 0) - (series.distanceM[first] ?? 0);
    points.push(`${x(way).toFixed(1)},${y(height(first) - height(i)).toFixed(1)}`);
  }
  return points.length < 2 ? "" : `M${points.join("L")}`;
}

/**
 * Every lull as a line of energy height paid against way made, and the pooled glide ratio as the ruled slope
 * through them: flatter is the better glide.
 */
export function LullFan(props: { series: SpeedSeries; lulls: readonly Lull[]; glide: GlideFigures | null }) {
  const { series, lulls, glide } = props;
  const titleId = useId();
  const shown = useMemo(() => {
    const every = Math.max(1, Math.ceil(lulls.length / LINES_MAX));
    return lulls.filter((_, i) => i % every === 0);
  }, [lulls]);
  const mostM = Math.max(10, ...shown.map((lull) => lull.distanceM));
  const mostHeightM = Math.max(0.5, ...shown.map((lull) => lull.heightLostM)) * 1.05;
  const axes = useMemo<Axes>(
    () => ({
      x: (m) => PAD.left + (m / mostM) * (WIDTH - PAD.left - PAD.right),
      y: (m) => PAD.top + (m / mostHeightM) * (HEIGHT - PAD.top - PAD.bottom),
    }),
    [mostM, mostHeightM],
  );
  const lines = useMemo(
    () => shown.map((lull) => lullPath(series, lull, axes)).join(""),
    [shown, series, axes],
  );
  const words =
    glide === null
      ? `${lulls.length} lulls, too few for a glide ratio.`
      : `${glide.lulls} lulls. Pooled glide ratio ${formatNumber(glide.ratio, 1)}, 95 % interval ${formatNumber(glide.ratioLow, 1)} to ${formatNumber(glide.ratioHigh, 1)}.`;
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      role="img"
      aria-labelledby={titleId}
      className="bg-sheet rule-ink h-auto w-full max-w-4xl"
    >
      <title id={titleId}>{`Lull fan. ${words}`}</title>
      {niceTicks(0, mostHeightM, 4).map((tick) => (
        <g key={`h${tick}`}>
          <line
            x1={PAD.left}
            x2={WIDTH - PAD.right}
            y1={axes.y(tick)}
            y2={axes.y(tick)}
            stroke="var(--hairline)"
          />
          <text
            x={PAD.left - 8}
            y={axes.y(tick) + 4}
            textAnchor="end"
            fontSize="12"
            fill="var(--muted)"
            className="num"
          >
            {formatNumber(tick, 1)}
          </text>
        </g>
      ))}
      {niceTicks(0, mostM, 6).map((tick) => (
        <text
          key={`d${tick}`}
          x={axes.x(tick)}
          y={HEIGHT - 14}
          textAnchor="middle"
          fontSize="12"
          fill="var(--muted)"
          className="num"
        >
          {formatNumber(tick, 0)}
        </text>
      ))}
      <text x={WIDTH - PAD.right + 8} y={HEIGHT - 14} fontSize="12" fill="var(--muted)">
        m of way
      </text>
      <text x={PAD.left + 4} y={HEIGHT - PAD.bottom - 6} fontSize="12" fill="var(--muted)">
        m of energy height lost
      </text>
      <path d={lines} fill="none" stroke="var(--swell)" strokeWidth="1" opacity="0.45" />
      {glide !== null && <Slope glide={glide} axes={axes} mostM={mostM} mostHeightM={mostHeightM} />}
    </svg>
  );
}

function Slope(props: { glide: GlideFigures; axes: Axes; mostM: number; mostHeightM: number }) {
  const { glide, axes, mostM, mostHeightM } = props;
  const end = (ratio: number) => {
    const way = Math.min(mostM, ratio * mostHeightM);
    return { x: axes.x(way), y: axes.y(way / ratio) };
  };
  const at = end(glide.ratio);
  const from = { x: axes.x(0), y: axes.y(0) };
  const [low, high] = [end(glide.ratioLow), end(glide.ratioHigh)];
  return (
    <>
      <path
        d={`M${from.x},${from.y}L${low.x},${low.y}L${high.x},${high.y}Z`}
        fill="var(--buoy)"
        opacity="0.18"
      />
      <line x1={from.x} y1={from.y} x2={at.x} y2={at.y} stroke="var(--buoy)" strokeWidth="2.5" />
      <text x={at.x + 8} y={at.y + 2} fontSize="18" fontWeight="600" fill="var(--ink)" className="num">
        {formatNumber(glide.ratio, 1)}
      </text>
      <text x={at.x + 8} y={at.y + 18} fontSize="12" fill="var(--muted)" className="num">
        {formatNumber(glide.ratioLow, 1)}–{formatNumber(glide.ratioHigh, 1)}
      </text>
    </>
  );
}
