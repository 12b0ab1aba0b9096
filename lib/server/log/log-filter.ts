import { z } from "zod";

/** The columns the log can be sorted by; anything else in the URL falls back to the start. */
export const LOG_SORTS = [
  "start",
  "elapsed",
  "distance",
  "onFoilDistance",
  "onFoilTime",
  "onFoilShare",
  "takeoffs",
  "longest",
  "bumpSpeed",
  "bumpRides",
  "glide",
  "best2s",
  "best10s",
  "best500m",
  "bestNm",
  "wind",
] as const;

export type LogSort = (typeof LOG_SORTS)[number];

export const LOG_PAGE_SIZE = 50;

const id = z.string().min(1).max(40);
const date = z.iso.date();
const knots = z.coerce.number().min(0).max(100);

/** What the URL of the log (and of the comparison) can say. A value that makes no sense is left out, not an error. */
export const logFilterSchema = z.object({
  frontWing: id.optional().catch(undefined),
  part: id.optional().catch(undefined),
  setup: id.optional().catch(undefined),
  discipline: z.enum(["downwind", "wing", "other"]).optional().catch(undefined),
  spot: z.string().trim().min(1).max(80).optional().catch(undefined),
  from: date.optional().catch(undefined),
  to: date.optional().catch(undefined),
  windMin: knots.optional().catch(undefined),
  windMax: knots.optional().catch(undefined),
  quality: z.enum(["A", "B", "C", "D"]).optional().catch(undefined),
  sort: z.enum(LOG_SORTS).default("start").catch("start"),
  order: z.enum(["asc", "desc"]).default("desc").catch("desc"),
  page: z.coerce.number().int().min(1).max(10_000).default(1).catch(1),
});

export type LogFilter = z.infer<typeof logFilterSchema>;

/** The filter keys that narrow the log, in the order of the form. */
export const LOG_NARROWING = [
  "frontWing",
  "part",
  "setup",
  "discipline",
  "spot",
  "from",
  "to",
  "windMin",
  "windMax",
  "quality",
] as const satisfies readonly (keyof LogFilter)[];

type SearchParams = Readonly<Record<string, string | string[] | undefined>>;

/** Reads the filter from search parameters; empty fields of a submitted form count as absent. */
export function parseLogFilter(params: SearchParams): LogFilter {
  const single = Object.fromEntries(
    Object.entries(params).flatMap(([key, value]) => {
      const first = Array.isArray(value) ? value[0] : value;
      return first === undefined || first.trim() === "" ? [] : [[key, first]];
    }),
  );
  return logFilterSchema.parse(single);
}

/** The filter as a query string without defaults, for links that change one thing; page 1 unless said. */
export function logQuery(filter: LogFilter, change: Partial<LogFilter> = {}): string {
  const merged: Record<string, unknown> = { ...filter, page: 1, ...change };
  const query = new URLSearchParams();
  for (const [key, value] of Object.entries(merged)) {
    const isDefault =
      value === undefined ||
      (key === "sort" && value === "start") ||
      (key === "order" && value === "desc") ||
      (key === "page" && value === 1);
    if (!isDefault) query.set(key, String(value));
  }
  const text = query.toString();
  return text === "" ? "" : `?${text}`;
}

/** What a comparison can be made by: whole setups, a part, or an adjustment. */
export const COMPARE_BY = ["setup", "front_wing", "rear_wing", "mast_position", "shim"] as const;
export type CompareBy = (typeof COMPARE_BY)[number];

/** Reads what to compare by; setups unless the URL says something known. */
export function parseCompareBy(value: string | string[] | undefined): CompareBy {
  return z.enum(COMPARE_BY).catch("setup").parse(value);
}
