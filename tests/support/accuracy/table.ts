import { median, quantile } from "@/lib/numeric/quantile";

import type { Scored } from "./corpus";

/** Figures where more is better; their other end is the tenth percentile. */
const GOOD = /F1|IoU|Recall|Precision|Kept/;

export type Cell = { readonly middle: number; readonly worst: number; readonly sessions: number };
export type Coverage = {
  readonly sessions: number;
  readonly within1: number;
  readonly within196: number;
  readonly meanInSe: number;
};

const present = (values: readonly (number | undefined)[]): number[] =>
  values.filter((v): v is number => v !== undefined && Number.isFinite(v));

/** Median of a figure over sessions and its 90th percentile (10th where more is better); signed errors by size, biases signed. */
export function cellOf(scored: readonly Scored[], figure: string): Cell | null {
  const raw = present(scored.map((s) => s.score.values[figure]));
  if (raw.length === 0) return null;
  const values = figure.endsWith("BiasS") ? raw : raw.map(Math.abs);
  return {
    middle: median(values),
    worst: quantile(values, GOOD.test(figure) ? 0.1 : 0.9),
    sessions: raw.length,
  };
}

/** How often a stated standard error holds the error, and the mean error in units of it. */
export function coverageOf(scored: readonly Scored[], figure: string | null): Coverage | null {
  const z = present(
    scored.flatMap((s) => (figure === null ? Object.values(s.score.inSe) : [s.score.inSe[figure]])),
  );
  if (z.length === 0) return null;
  return {
    sessions: z.length,
    within1: z.filter((v) => Math.abs(v) <= 1).length / z.length,
    within196: z.filter((v) => Math.abs(v) <= 1.96).length / z.length,
    meanInSe: z.reduce((sum, v) => sum + v, 0) / z.length,
  };
}

export const FIGURES = [
  ...["flightF1", "takeoffS", "takeoffBiasS", "touchdownS", "touchdownBiasS", "foilDistPct", "waterDistPct"],
  ...["s2Pct", "s10Pct", "m500Pct", "nmPct", "waterIoU", "surgeF1", "surgeRecall", "surgePrecision"],
  ...["turnF1", "turnKindF1", "turnKept", "turnS", "windDeg"],
] as const;
export const STATED = ["s2", "s10", "m500", "nm", "waterDist"] as const;

const number = (v: number): string => (Math.abs(v) >= 10 ? v.toFixed(1) : v.toFixed(2));

/** A table in plain text: a line a figure, a column a group of sessions. */
export function accuracyTable(scored: readonly Scored[], groupOf: (s: Scored) => string): string {
  const groups = [...new Set(scored.map(groupOf))];
  const of = (group: string) => scored.filter((s) => groupOf(s) === group);
  const line = (head: string, cells: readonly string[]) =>
    head.padEnd(16) + cells.map((c) => c.padStart(15)).join("");
  const lines = [
    line(
      "median [p90]",
      groups.map((g) => `${g} (${of(g).length})`),
    ),
  ];
  for (const figure of FIGURES) {
    const cells = groups.map((g) => cellOf(of(g), figure));
    if (cells.every((c) => c === null)) continue;
    lines.push(
      line(
        figure,
        cells.map((c) => (c ? `${number(c.middle)} [${number(c.worst)}]` : "-")),
      ),
    );
  }
  for (const figure of [...STATED, null]) {
    const cells = groups.map((g) => coverageOf(of(g), figure));
    const share = (v: number) => `${Math.round(100 * v)}`;
    const text = (c: Coverage | null) =>
      c ? `${share(c.within1)}/${share(c.within196)} ${c.meanInSe.toFixed(2)}` : "-";
    lines.push(line(`SE ${figure ?? "all"}`, cells.map(text)));
  }
  return lines.join("\n");
}
