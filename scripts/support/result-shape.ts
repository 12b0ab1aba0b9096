import type { Analysis, Best, BestKey, Discipline } from "@/lib/analysis/analysis";

/** What may be said beside a file: the fields of NAME.input.json that the analysis uses. */
export type SessionInput = { readonly sport?: unknown; readonly utcOffsetH?: unknown };

/** The discipline of a sport by name; a rider on bumps when nothing is said. */
export function disciplineOf(sport: unknown): Discipline {
  if (sport === "wing") return "wing";
  if (sport === undefined || sport === null || sport === "downwind") return "downwind";
  return "other";
}

const iso = (timeMs: number): string | null =>
  Number.isFinite(timeMs) ? new Date(Math.round(timeMs)).toISOString() : null;

function best(analysis: Analysis, key: BestKey): Best | null {
  const found = analysis.figures.bests[key];
  return "withheld" in found ? null : found;
}

/** An analysis as the JSON object that the practice scorer reads, with the quality report and the raw counts. */
export function resultShape(name: string, analysis: Analysis): Record<string, unknown> {
  const { figures, quality, waterSessions, glideRatio } = { ...analysis, glideRatio: analysis.figures.glide };
  const [s2, s10, m500, nm] = (["s2", "s10", "m500", "nm"] as const).map((key) => best(analysis, key));
  return {
    file: name,
    analysisVersion: analysis.version,
    rawFixes: analysis.rawFixes,
    rawSegments: analysis.rawSegments,
    rawLengthM: analysis.rawLengthM,
    firstTime: iso(analysis.firstFixMs),
    lastTime: iso(analysis.lastFixMs),
    quality,
    totals: {
      waterDistanceM: figures.waterDistanceM,
      seWaterDistanceM: figures.waterDistanceSeM,
      onFoilDistanceM: figures.onFoilDistanceM,
      onFoilTimeS: figures.onFoilTimeS,
      takeoffs: figures.takeoffs,
    },
    onFoilSegments: analysis.segments.map((segment) => ({
      startTime: iso(segment.startMs),
      endTime: iso(segment.endMs),
      distanceM: segment.distanceM,
      meanSpeed: segment.speedMpsMean,
      maxSpeed: segment.speedMpsMax,
      bearingDeg: segment.bearingDeg,
      confidence: segment.confidence,
    })),
    bests: {
      s2: s2?.speedMps ?? null,
      s10: s10?.speedMps ?? null,
      m500: m500?.speedMps ?? null,
      nm: nm?.speedMps ?? null,
      seS2: s2?.seMps ?? null,
      seS10: s10?.seMps ?? null,
      seM500: m500?.seMps ?? null,
      seNm: nm?.seMps ?? null,
    },
    allBests: figures.bests,
    bumps: figures.bumps,
    glideRatio: glideRatio?.ratio ?? null,
    glide: glideRatio,
    turns: analysis.turns.map((turn) => ({
      time: iso(turn.timeMs),
      kind: turn.kind,
      keptFoil: turn.keptFoil,
    })),
    surges: analysis.bumpRides.map((ride) => ({ peakTime: iso(ride.peakMs), peakSpeed: ride.speedMpsPeak })),
    windFromDeg: analysis.windFromDeg,
    waterStart: waterSessions.length > 0 ? iso(analysis.window.startMs) : null,
    waterEnd: waterSessions.length > 0 ? iso(analysis.window.endMs) : null,
    waterSessions: waterSessions.map((one) => ({ start: iso(one.startMs), end: iso(one.endMs) })),
  };
}
