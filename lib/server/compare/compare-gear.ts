import { partsOf } from "@/db/queries/gear";
import { spanObservations } from "@/db/queries/log";
import { groupBy } from "@/lib/compare/group-by";
import { spreadOf, type Spread } from "@/lib/compare/group-figures";
import { describeMastPosition, describeShim } from "@/lib/gear/describe-setup";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { scopeOf } from "@/lib/server/log/list-log";
import type { CompareBy, LogFilter } from "@/lib/server/log/log-filter";

export const COMPARED_FIGURES = ["bumpRidingSpeedMps", "best500mMps", "glideRatio", "onFoilShare"] as const;
export type ComparedFigure = (typeof COMPARED_FIGURES)[number];

export type ComparedGroup = {
  readonly key: string;
  readonly name: string;
  readonly sessions: number;
  readonly days: number;
  readonly onFoilTimeS: number;
  readonly figures: Readonly<Record<ComparedFigure, Spread | null>>;
};

type Observation = Awaited<ReturnType<typeof spanObservations>>[number];

function groupOf(
  row: Observation,
  by: CompareBy,
  partNames: ReadonlyMap<string, string>,
): { key: string; name: string } {
  const { setup } = row;
  const part = (id: string | null, missing: string) =>
    id === null ? { key: "none", name: missing } : { key: id, name: partNames.get(id) ?? missing };
  if (by === "front_wing") return part(setup.frontWingId, "No front wing entered");
  if (by === "rear_wing") return part(setup.rearWingId, "No rear wing entered");
  if (by === "shim") return { key: String(setup.shimStackDeg), name: describeShim(setup.shimStackDeg) };
  if (by === "mast_position") {
    const words = describeMastPosition(setup.mastPositionMm);
    return { key: String(setup.mastPositionMm), name: words ?? "Mast position not entered" };
  }
  return { key: setup.id, name: setup.name };
}

const DAY_MS = 86_400_000;

/**
 * Per setup, part or adjustment: sessions, days, time on foil, and the spread of four figures over the gear
 * spans of the asker's log that the filter leaves, the group with the most time on foil first. These are plain
 * medians: rider's form, wind and day are not taken out.
 */
export async function compareGear(ctx: Context, filter: LogFilter, by: CompareBy): Promise<ComparedGroup[]> {
  const ownerId = requireUserId(ctx);
  const [rows, parts] = await Promise.all([
    spanObservations(ctx.db.read, ownerId, scopeOf(filter)),
    partsOf(ctx.db.read, ownerId),
  ]);
  const partNames = new Map(parts.map((row) => [row.id, `${row.maker} ${row.model}`]));
  const groups = groupBy(rows, (row) => groupOf(row, by, partNames).key);
  return [...groups]
    .map(([key, members]) => ({
      key,
      name: members[0] === undefined ? key : groupOf(members[0], by, partNames).name,
      sessions: new Set(members.map((row) => row.sessionId)).size,
      days: new Set(members.map((row) => Math.floor(row.startMs / DAY_MS))).size,
      onFoilTimeS: members.reduce((sum, row) => sum + row.onFoilTimeS, 0),
      figures: Object.fromEntries(
        COMPARED_FIGURES.map((figure) => [figure, spreadOf(members.map((row) => row[figure]))]),
      ) as Record<ComparedFigure, Spread | null>,
    }))
    .sort((a, b) => b.onFoilTimeS - a.onFoilTimeS || a.name.localeCompare(b.name, "en"));
}
