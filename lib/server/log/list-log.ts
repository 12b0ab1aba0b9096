import { logPage, logTotals, setupNamesOf, spotsOf, type LogScope } from "@/db/queries/log";
import { groupBy } from "@/lib/compare/group-by";
import { requireUserId, type Context } from "@/lib/server/context/context";
import { MPS_PER_KNOT } from "@/lib/units/speed";
import { LOG_PAGE_SIZE, type LogFilter } from "./log-filter";

const DAY_MS = 86_400_000;
const GRADES = ["A", "B", "C", "D"] as const;

/** The filter in rows' own units. Days are UTC days; a quality means that grade or better. */
export function scopeOf(filter: LogFilter): LogScope {
  return {
    frontWingId: filter.frontWing,
    partId: filter.part,
    setupId: filter.setup,
    discipline: filter.discipline,
    spot: filter.spot,
    fromMs: filter.from === undefined ? undefined : Date.parse(`${filter.from}T00:00:00Z`),
    beforeMs: filter.to === undefined ? undefined : Date.parse(`${filter.to}T00:00:00Z`) + DAY_MS,
    windMpsMin: filter.windMin === undefined ? undefined : filter.windMin * MPS_PER_KNOT,
    windMpsMax: filter.windMax === undefined ? undefined : filter.windMax * MPS_PER_KNOT,
    grades: filter.quality === undefined ? undefined : GRADES.slice(0, GRADES.indexOf(filter.quality) + 1),
  };
}

export type LogRow = Awaited<ReturnType<typeof logPage>>[number] & { readonly setups: readonly string[] };

export type Log = {
  readonly rows: readonly LogRow[];
  readonly totals: Awaited<ReturnType<typeof logTotals>>;
  readonly page: number;
  readonly pages: number;
  /** Whether the asker has any session at all: tells a first use from a filter without result. */
  readonly hasAny: boolean;
};

/** A page of the asker's log with the totals of all that the filter leaves. */
export async function listLog(ctx: Context, filter: LogFilter): Promise<Log> {
  const ownerId = requireUserId(ctx);
  const scope = scopeOf(filter);
  const totals = await logTotals(ctx.db.read, ownerId, scope);
  const pages = Math.max(1, Math.ceil(totals.sessions / LOG_PAGE_SIZE));
  const page = Math.min(filter.page, pages);
  const rows = await logRows(ctx, filter, { limit: LOG_PAGE_SIZE, offset: (page - 1) * LOG_PAGE_SIZE });
  const hasAny = totals.sessions > 0 || (await logTotals(ctx.db.read, ownerId, {})).sessions > 0;
  return { rows, totals, page, pages, hasAny };
}

/** Rows of the asker's log with the setups ridden in each, for the page and for the CSV of what is filtered. */
export async function logRows(
  ctx: Context,
  filter: LogFilter,
  range: { limit: number; offset: number },
): Promise<LogRow[]> {
  const ownerId = requireUserId(ctx);
  const found = await logPage(ctx.db.read, ownerId, scopeOf(filter), {
    sort: filter.sort,
    order: filter.order,
    ...range,
  });
  const names = await setupNamesOf(
    ctx.db.read,
    ownerId,
    found.map((row) => row.id),
  );
  const bySession = groupBy(names, (row) => row.sessionId);
  return found.map((row) => ({
    ...row,
    setups: [...new Set((bySession.get(row.id) ?? []).map((ridden) => ridden.name))],
  }));
}

/** The spots the asker has named. */
export async function listSpots(ctx: Context): Promise<string[]> {
  return spotsOf(ctx.db.read, requireUserId(ctx));
}
