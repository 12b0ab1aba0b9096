import { LOG_NARROWING, type LogFilter } from "@/lib/server/log/log-filter";

/** The filter as values of the form's fields. */
export function filterValues(filter: LogFilter): Record<string, string | number | undefined> {
  return Object.fromEntries(LOG_NARROWING.map((key) => [key, filter[key]]));
}

/** By how many fields the log is narrowed. */
export function narrowedBy(filter: LogFilter): number {
  return LOG_NARROWING.filter((key) => filter[key] !== undefined).length;
}
