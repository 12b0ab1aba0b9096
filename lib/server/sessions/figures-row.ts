import type { sessionFigures } from "@/db/schema/session-figures";
import type { Best, BestKey, Discipline, Figures } from "@/lib/analysis/analysis";

export type FiguresRow = typeof sessionFigures.$inferInsert;

const speedOf = (figures: Figures, key: BestKey): number | null => {
  const best = figures.bests[key];
  return "speedMps" in best ? (best satisfies Best).speedMps : null;
};

/** The narrow row that lists and comparisons read, from the whole set of figures of a session or a gear span. */
export function figuresRow(
  of: {
    sessionId: string;
    spanId: string;
    ownerId: string;
    setupId: string | null;
    discipline: Discipline;
  },
  figures: Figures,
): FiguresRow {
  return {
    ...of,
    startMs: figures.startMs,
    elapsedS: figures.elapsedS,
    waterDistanceM: figures.waterDistanceM,
    onFoilDistanceM: figures.onFoilDistanceM,
    onFoilTimeS: figures.onFoilTimeS,
    onFoilShare: figures.onFoilShareOfDistance,
    takeoffs: figures.takeoffs,
    longestSegmentM: figures.longestSegmentM,
    bumpRidingSpeedMps: figures.bumps?.ridingSpeedMps ?? null,
    bumpRides: figures.bumps?.rides ?? null,
    glideRatio: figures.glide?.ratio ?? null,
    best2sMps: speedOf(figures, "s2"),
    best10sMps: speedOf(figures, "s10"),
    best500mMps: speedOf(figures, "m500"),
    bestNmMps: speedOf(figures, "nm"),
    figures,
  };
}
