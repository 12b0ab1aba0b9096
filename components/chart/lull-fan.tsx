"use client";

import { useEffect, useId, useMemo, useRef, useState } from "react";
import { formatNumber } from "@/lib/display/format-number";
import { niceTicks } from "@/lib/display/ticks";
import type { GlideFigures, Lull } from "@/lib/analysis/analysis";
import type { SpeedSeries } from "@/lib/track/speed-series";

/** Until the page has said how wide it is. */
const WIDTH_FIRST = 640;
const HEIGHT = 320;
const PAD = { left: 40, right: 84, top: 30, bottom: 46 };
/** Standard gravity, m/s². Source: 3rd CGPM (1901). */
const G = 9.80665;
/** More lines than this make a blot; the rest is left out of the drawing, never out of the figure. */
const LINES_MAX = 400;

type Axes = { readonly x: (m: number) => number; readonly y: (m: number) => number };

/** The drawing's own width, so that its words keep their size on a phone. */
function useWidth() {
  const box = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(WIDTH_FIRST);
  useEffect(() => {
    const element = box.current;
    if (element === null) return;
    const observer = new ResizeObserver(([entry]) => {
      const wide = Math.floor(entry?.contentRect.width ?? 0);
      if (wide > 0) setWidth(wide);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return { box, width };
}

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
  const { box, width } = useWidth();
  const shown = useMemo(() => {
    const every = Math.max(1, Math.ceil(lulls.length / LINES_MAX));
    return lulls.filter((_, i) => i % every === 0);
  }, [lulls]);
  const mostM = Math.max(10, ...shown.map((lull) => lull.distanceM));
  const mostHeightM = Math.max(0.5, ...shown.map((lull) => lull.heightLostM)) * 1.05;
  const axes = useMemo<Axes>(
    () => ({
      x: (m) => PAD.left + (m / mostM) * (width - PAD.left - PAD.right),
      y: (m) => PAD.top + (m / mostHeightM) * (HEIGHT - PAD.top - PAD.bottom),
    }),
    [mostM, mostHeightM, width],
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
    <div ref={box} className="max-w-4xl">
      <svg
        viewBox={`0 0 ${width} ${HEIGHT}`}
        role="img"
        aria-labelledby={titleId}
        className="bg-sheet rule-ink block h-auto w-full"
      >
        <title id={titleId}>{`Lull fan. ${words}`}</title>
        <Scales axes={axes} width={width} mostM={mostM} mostHeightM={mostHeightM} />
        <path d={lines} fill="none" stroke="var(--swell)" strokeWidth="1" opacity="0.45" />
        {glide !== null && <Slope glide={glide} axes={axes} mostM={mostM} mostHeightM={mostHeightM} />}
      </svg>
    </div>
  );
}

/** Heights to the left, ways below, each with its name where no line runs. */
function Scales(props: { axes: Axes; width: number; mostM: number; mostHeightM: number }) {
  const { axes, width, mostM, mostHeightM } = props;
  const right = width - PAD.right;
  return (
    <g fontSize="12" fill="var(--muted)">
      {niceTicks(0, mostHeightM, 4).map((tick) => (
        <g key={`h${tick}`}>
          <line x1={PAD.left} x2={right} y1={axes.y(tick)} y2={axes.y(tick)} stroke="var(--hairline)" />
          <text x={PAD.left - 8} y={axes.y(tick) + 4} textAnchor="end" className="num">
            {formatNumber(tick, 1)}
          </text>
        </g>
      ))}
      {niceTicks(0, mostM, Math.max(2, Math.floor(width / 90))).map((tick) => (
        <text
          key={`d${tick}`}
          x={axes.x(tick)}
          y={HEIGHT - PAD.bottom + 18}
          textAnchor="middle"
          className="num"
        >
          {formatNumber(tick, 0)}
        </text>
      ))}
      <text x={8} y={14}>
        Energy height lost, m
      </text>
      <text x={right} y={HEIGHT - 8} textAnchor="end">
        Way made, m
      </text>
    </g>
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
  // The words stand over the lines and above the scale, wherever the slope ends.
  const wordsY = Math.min(at.y, HEIGHT - PAD.bottom - 24);
  const halo = { paintOrder: "stroke", stroke: "var(--sheet)", strokeWidth: 4, className: "num" };
  return (
    <>
      <path
        d={`M${from.x},${from.y}L${low.x},${low.y}L${high.x},${high.y}Z`}
        fill="var(--buoy)"
        opacity="0.18"
      />
      <line x1={from.x} y1={from.y} x2={at.x} y2={at.y} stroke="var(--buoy)" strokeWidth="2.5" />
      <text x={at.x + 8} y={wordsY + 2} fontSize="18" fontWeight="600" fill="var(--ink)" {...halo}>
        {formatNumber(glide.ratio, 1)}
      </text>
      <text x={at.x + 8} y={wordsY + 18} fontSize="12" fill="var(--muted)" {...halo}>
        {formatNumber(glide.ratioLow, 1)}–{formatNumber(glide.ratioHigh, 1)}
      </text>
    </>
  );
}
