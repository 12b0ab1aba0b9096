import {
  and,
  asc,
  count,
  desc,
  eq,
  exists,
  gte,
  inArray,
  isNull,
  lte,
  ne,
  or,
  sql,
  type SQL,
} from "drizzle-orm";
import type { Reader } from "@/db/client";
import { gearSpan } from "@/db/schema/gear-span";
import { session } from "@/db/schema/session";
import { sessionFigures, WHOLE_SESSION } from "@/db/schema/session-figures";
import { setup } from "@/db/schema/setup";

/** Narrowing of the log in rows' own units (m/s, epoch ms); undefined means any. */
export type LogScope = {
  readonly frontWingId?: string;
  readonly partId?: string;
  readonly setupId?: string;
  readonly discipline?: "downwind" | "wing" | "other";
  readonly spot?: string;
  readonly fromMs?: number;
  readonly beforeMs?: number;
  readonly windMpsMin?: number;
  readonly windMpsMax?: number;
  readonly grades?: readonly ("A" | "B" | "C" | "D")[];
};

const SORT_COLUMNS = {
  start: session.startMs,
  elapsed: sessionFigures.elapsedS,
  distance: sessionFigures.waterDistanceM,
  onFoilDistance: sessionFigures.onFoilDistanceM,
  onFoilTime: sessionFigures.onFoilTimeS,
  onFoilShare: sessionFigures.onFoilShare,
  takeoffs: sessionFigures.takeoffs,
  longest: sessionFigures.longestSegmentM,
  bumpSpeed: sessionFigures.bumpRidingSpeedMps,
  bumpRides: sessionFigures.bumpRides,
  glide: sessionFigures.glideRatio,
  best2s: sessionFigures.best2sMps,
  best10s: sessionFigures.best10sMps,
  best500m: sessionFigures.best500mMps,
  bestNm: sessionFigures.bestNmMps,
  wind: session.windSpeedMps,
} as const;

export type LogSortKey = keyof typeof SORT_COLUMNS;

const anyPart = (partId: string): SQL | undefined =>
  or(
    eq(setup.frontWingId, partId),
    eq(setup.rearWingId, partId),
    eq(setup.fuselageId, partId),
    eq(setup.mastId, partId),
    eq(setup.boardId, partId),
    eq(setup.handWingId, partId),
    eq(setup.shimSetId, partId),
  );

/** Conditions on the gear of one span (its setup row is joined). */
function gearConditions(scope: LogScope): SQL[] {
  const list: (SQL | undefined)[] = [
    scope.frontWingId === undefined ? undefined : eq(setup.frontWingId, scope.frontWingId),
    scope.setupId === undefined ? undefined : eq(setup.id, scope.setupId),
    scope.partId === undefined ? undefined : anyPart(scope.partId),
  ];
  return list.filter((condition) => condition !== undefined);
}

/** Conditions on the session itself; the owner's, not deleted. */
function sessionConditions(ownerId: string, scope: LogScope): SQL[] {
  const list: (SQL | undefined)[] = [
    eq(session.ownerId, ownerId),
    isNull(session.deletedAtMs),
    scope.discipline === undefined ? undefined : eq(session.discipline, scope.discipline),
    scope.spot === undefined ? undefined : eq(session.spot, scope.spot),
    scope.fromMs === undefined ? undefined : gte(session.startMs, scope.fromMs),
    scope.beforeMs === undefined ? undefined : lte(session.startMs, scope.beforeMs - 1),
    scope.windMpsMin === undefined ? undefined : gte(session.windSpeedMps, scope.windMpsMin),
    scope.windMpsMax === undefined ? undefined : lte(session.windSpeedMps, scope.windMpsMax),
    scope.grades === undefined ? undefined : inArray(session.qualityGrade, [...scope.grades]),
  ];
  return list.filter((condition) => condition !== undefined);
}

function listConditions(db: Reader, ownerId: string, scope: LogScope): SQL | undefined {
  const gear = gearConditions(scope);
  const ridden =
    gear.length === 0
      ? []
      : [
          exists(
            db
              .select({ one: sql`1` })
              .from(gearSpan)
              .innerJoin(setup, eq(setup.id, gearSpan.setupId))
              .where(and(eq(gearSpan.sessionId, session.id), ...gear)),
          ),
        ];
  return and(eq(sessionFigures.spanId, WHOLE_SESSION), ...sessionConditions(ownerId, scope), ...ridden);
}

const LIST_COLUMNS = {
  id: session.id,
  title: session.title,
  spot: session.spot,
  discipline: session.discipline,
  timeZone: session.timeZone,
  startMs: session.startMs,
  windFromDeg: session.windFromDeg,
  windSpeedMps: session.windSpeedMps,
  qualityGrade: session.qualityGrade,
  elapsedS: sessionFigures.elapsedS,
  waterDistanceM: sessionFigures.waterDistanceM,
  onFoilDistanceM: sessionFigures.onFoilDistanceM,
  onFoilTimeS: sessionFigures.onFoilTimeS,
  onFoilShare: sessionFigures.onFoilShare,
  takeoffs: sessionFigures.takeoffs,
  longestSegmentM: sessionFigures.longestSegmentM,
  bumpRidingSpeedMps: sessionFigures.bumpRidingSpeedMps,
  bumpRides: sessionFigures.bumpRides,
  glideRatio: sessionFigures.glideRatio,
  best2sMps: sessionFigures.best2sMps,
  best10sMps: sessionFigures.best10sMps,
  best500mMps: sessionFigures.best500mMps,
  bestNmMps: sessionFigures.bestNmMps,
} as const;

/** One page of the log; rows without the sorted figure come last whichever way it is sorted. */
export async function logPage(
  db: Reader,
  ownerId: string,
  scope: LogScope,
  page: { sort: LogSortKey; order: "asc" | "desc"; limit: number; offset: number },
) {
  const column = SORT_COLUMNS[page.sort];
  return db
    .select(LIST_COLUMNS)
    .from(session)
    .innerJoin(sessionFigures, eq(sessionFigures.sessionId, session.id))
    .where(listConditions(db, ownerId, scope))
    .orderBy(sql`${column} IS NULL`, page.order === "asc" ? asc(column) : desc(column), desc(session.id))
    .limit(page.limit)
    .offset(page.offset);
}

/** Sums over all of the log that the scope leaves, not only the page shown. */
export async function logTotals(db: Reader, ownerId: string, scope: LogScope) {
  const rows = await db
    .select({
      sessions: count(),
      elapsedS: sql<number>`coalesce(sum(${sessionFigures.elapsedS}), 0)`,
      waterDistanceM: sql<number>`coalesce(sum(${sessionFigures.waterDistanceM}), 0)`,
      onFoilDistanceM: sql<number>`coalesce(sum(${sessionFigures.onFoilDistanceM}), 0)`,
      onFoilTimeS: sql<number>`coalesce(sum(${sessionFigures.onFoilTimeS}), 0)`,
      bumpRides: sql<number>`coalesce(sum(${sessionFigures.bumpRides}), 0)`,
    })
    .from(session)
    .innerJoin(sessionFigures, eq(sessionFigures.sessionId, session.id))
    .where(listConditions(db, ownerId, scope));
  return (
    rows[0] ?? {
      sessions: 0,
      elapsedS: 0,
      waterDistanceM: 0,
      onFoilDistanceM: 0,
      onFoilTimeS: 0,
      bumpRides: 0,
    }
  );
}

/** The names of the setups ridden in the given sessions, in order of time. */
export async function setupNamesOf(db: Reader, ownerId: string, sessionIds: readonly string[]) {
  if (sessionIds.length === 0) return [];
  return db
    .select({ sessionId: gearSpan.sessionId, setupId: setup.id, name: setup.name })
    .from(gearSpan)
    .innerJoin(setup, eq(setup.id, gearSpan.setupId))
    .where(and(eq(gearSpan.ownerId, ownerId), inArray(gearSpan.sessionId, [...sessionIds])))
    .orderBy(asc(gearSpan.startMs));
}

/** The spots the owner has named, for the filter. */
export async function spotsOf(db: Reader, ownerId: string): Promise<string[]> {
  const rows = await db
    .selectDistinct({ spot: session.spot })
    .from(session)
    .where(and(eq(session.ownerId, ownerId), isNull(session.deletedAtMs), ne(session.spot, "")))
    .orderBy(asc(session.spot));
  return rows.map((row) => row.spot);
}

/** The figures of every gear span in the scope with the setup it was ridden on: what comparisons read. */
export async function spanObservations(db: Reader, ownerId: string, scope: LogScope) {
  return db
    .select({
      sessionId: sessionFigures.sessionId,
      startMs: sessionFigures.startMs,
      onFoilTimeS: sessionFigures.onFoilTimeS,
      onFoilShare: sessionFigures.onFoilShare,
      bumpRidingSpeedMps: sessionFigures.bumpRidingSpeedMps,
      best500mMps: sessionFigures.best500mMps,
      glideRatio: sessionFigures.glideRatio,
      setup,
    })
    .from(sessionFigures)
    .innerJoin(session, eq(session.id, sessionFigures.sessionId))
    .innerJoin(setup, eq(setup.id, sessionFigures.setupId))
    .where(
      and(
        ne(sessionFigures.spanId, WHOLE_SESSION),
        ...sessionConditions(ownerId, scope),
        ...gearConditions(scope),
      ),
    );
}
