import type uPlot from "uplot";
import type { ThemeTokens } from "@/lib/display/theme-tokens";
import { timeTicks } from "@/lib/display/ticks";
import { formatTime, zoneOffsetMin } from "@/lib/display/format-time";
import { FLAG_GAP, type SpeedSeries, type Stretch } from "@/lib/track/speed-series";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";

/** Room for the speed scale at the left and for the last time label at the right, CSS pixels. */
export const PLOT_LEFT = 44;
export const PLOT_RIGHT = 12;

type Column = (number | null)[];

/** Times, speed, and the edges of its standard error in the rider's unit; gaps in the recording are null. */
export function speedColumns(series: SpeedSeries, unit: SpeedUnit): [number[], Column, Column, Column] {
  const times = new Array<number>(series.count);
  const speed: Column = new Array(series.count);
  const upper: Column = new Array(series.count);
  const lower: Column = new Array(series.count);
  for (let i = 0; i < series.count; i += 1) {
    times[i] = series.startMs + i * series.stepMs;
    const v = series.speedMps[i] ?? Number.NaN;
    const se = series.speedSeMps[i] ?? 0;
    const gap = ((series.flags[i] ?? 0) & FLAG_GAP) !== 0 || Number.isNaN(v);
    speed[i] = gap ? null : speedFromMps(v, unit);
    upper[i] = gap ? null : speedFromMps(v + se, unit);
    lower[i] = gap ? null : speedFromMps(Math.max(0, v - se), unit);
  }
  return [times, upper, lower, speed];
}

const FONT = '12px "Spline Sans Mono", ui-monospace, monospace';

/** Options of the speed chart: band of one standard error under the line, local clock times, no cursor of its own. */
export function speedPlotOptions(options: {
  width: number;
  height: number;
  timeZone: string;
  tokens: ThemeTokens;
}): uPlot.Options {
  const { width, height, timeZone, tokens } = options;
  const hairline = { stroke: tokens.hairline, width: 1 };
  const hidden = { points: { show: false }, stroke: "transparent", width: 0 };
  return {
    width,
    height,
    ms: 1,
    padding: [10, PLOT_RIGHT, 0, 0],
    legend: { show: false },
    cursor: { show: false },
    select: { show: false, left: 0, top: 0, width: 0, height: 0 },
    scales: { x: { time: false }, y: { range: (_, __, most) => [0, Math.max(1, most * 1.08)] } },
    bands: [{ series: [1, 2], fill: `${tokens.swell}55` }],
    series: [{}, hidden, hidden, { points: { show: false }, stroke: tokens.swell, width: 1.25 }],
    axes: [
      {
        stroke: tokens.muted,
        font: FONT,
        size: 28,
        grid: hairline,
        ticks: { show: false },
        splits: (plot, _, low, high) =>
          timeTicks(low, high, {
            wanted: Math.max(2, Math.floor(plot.width / 120)),
            offsetMin: zoneOffsetMin(low, timeZone),
          }),
        values: (_, splits) => splits.map((time) => formatTime(time, timeZone)),
      },
      { stroke: tokens.muted, font: FONT, size: PLOT_LEFT, grid: hairline, ticks: { show: false }, gap: 6 },
    ],
  };
}

/** Shows a stretch of the chart's own data. */
export function showStretch(plot: uPlot, stretch: Stretch): void {
  plot.setScale("x", { min: stretch.startMs, max: stretch.endMs });
}
