import type { Analysis } from "@/lib/analysis/analysis";
import { distanceFromM } from "@/lib/units/length";
import { speedFromMps } from "@/lib/units/speed";

const knots = (speedMps: number): string => `${speedFromMps(speedMps, "kn").toFixed(1)} kn`;
const kilometres = (lengthM: number): string => `${distanceFromM(lengthM, "km").toFixed(2)} km`;

function clock(timeMs: number, utcOffsetH: number): string {
  const local = new Date(timeMs + utcOffsetH * 3_600_000).toISOString();
  return `${local.slice(0, 10)} ${local.slice(11, 19)}`;
}

function minutes(timeS: number): string {
  const whole = Math.round(timeS);
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, "0")} s`;
}

function bestsLine(analysis: Analysis): string {
  const names = { s2: "2 s", s10: "10 s", m500: "500 m", nm: "1 NM" } as const;
  const parts = (Object.keys(names) as (keyof typeof names)[]).map((key) => {
    const best = analysis.figures.bests[key];
    return `${names[key]} ${"withheld" in best ? "–" : `${knots(best.speedMps)} ± ${knots(best.seMps)}`}`;
  });
  return `bests: ${parts.join(", ")}`;
}

/** A few readable lines about an analysis; times are shifted by the offset to UTC (hours). */
export function describeAnalysis(name: string, analysis: Analysis, utcOffsetH: number): string {
  const { figures, quality } = analysis;
  const zone = utcOffsetH === 0 ? "UTC" : `UTC${utcOffsetH > 0 ? "+" : ""}${utcOffsetH}`;
  const lines = [
    `${name}: ${analysis.rawFixes} fixes, ${kilometres(analysis.rawLengthM)} as recorded, quality ${quality.grade}`,
    ...quality.reasons.map((reason) => `  ${reason}`),
  ];
  if (analysis.waterSessions.length === 0) return [...lines, "  no time on the water found"].join("\n");
  lines.push(
    `  on the water ${clock(figures.startMs, utcOffsetH)} to ${clock(figures.endMs, utcOffsetH)} (${zone}), ` +
      `${kilometres(figures.waterDistanceM)} ± ${Math.round(figures.waterDistanceSeM)} m`,
    `  on foil ${minutes(figures.onFoilTimeS)}, ${kilometres(figures.onFoilDistanceM)}, ` +
      `${analysis.segments.length} segments, ${figures.takeoffs} take-offs`,
    `  ${bestsLine(analysis)}`,
  );
  if (figures.bumps) {
    const { rides, ridingSpeedMps, ridesPerKm } = figures.bumps;
    lines.push(`  ${rides} bump rides at ${knots(ridingSpeedMps)}, ${ridesPerKm.toFixed(1)} a km`);
  }
  if (figures.glide) {
    const { ratio, ratioLow, ratioHigh, lulls } = figures.glide;
    lines.push(
      `  glide ratio ${ratio.toFixed(1)} (${ratioLow.toFixed(1)} to ${ratioHigh.toFixed(1)}) from ${lulls} lulls`,
    );
  }
  return lines.join("\n");
}
