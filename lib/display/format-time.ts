import { MISSING } from "./format-number";

const MONTHS = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"] as const;
const LONG_MONTHS = [
  "January",
  "February",
  "March",
  "April",
  "May",
  "June",
  "July",
  "August",
  "September",
  "October",
  "November",
  "December",
] as const;
const DAYS = ["Sunday", "Monday", "Tuesday", "Wednesday", "Thursday", "Friday", "Saturday"] as const;
const two = (value: number) => String(value).padStart(2, "0");

/** Years 1000 to 9999: what a four-digit year can say. */
const FIRST_MS = -30610224000000;
const LAST_MS = 253402300799999;

const formatters = new Map<string, Intl.DateTimeFormat>();

/** Making a formatter costs a hundred times more than using it; only zones that exist are kept. */
function formatterOf(zone: string): Intl.DateTimeFormat | null {
  const kept = formatters.get(zone);
  if (kept !== undefined) return kept;
  try {
    const made = new Intl.DateTimeFormat("en-GB", {
      timeZone: zone,
      calendar: "gregory",
      numberingSystem: "latn",
      hourCycle: "h23",
      year: "numeric",
      month: "numeric",
      day: "numeric",
      hour: "numeric",
      minute: "numeric",
      second: "numeric",
    });
    formatters.set(zone, made);
    return made;
  } catch {
    return null;
  }
}

/**
 * Whether a text is a time zone name this runtime knows.
 *
 * @example
 * isTimeZone("Europe/Copenhagen"); // true
 */
export function isTimeZone(zone: string): boolean {
  return formatterOf(zone) !== null;
}

/** Calendar and clock of one instant in one zone; month 1 to 12, weekday 0 (Sunday) to 6. */
export type LocalTime = {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
  readonly second: number;
  readonly weekday: number;
};

/**
 * What calendar and clock showed at an instant (UTC epoch milliseconds) in an IANA zone; null when the instant is
 * missing or outside what dates can hold. An unknown zone counts as UTC: a wrong zone name never hides a time.
 *
 * @example
 * localTime(1749899280000, "Europe/Copenhagen")?.hour; // 13
 */
export function localTime(timeMs: number | null, zone: string): LocalTime | null {
  if (timeMs === null || !(timeMs >= FIRST_MS && timeMs <= LAST_MS)) return null;
  const formatter = formatterOf(zone) ?? formatterOf("UTC");
  if (formatter === null) return null;
  const parts = formatter.formatToParts(new Date(timeMs));
  const part = (type: Intl.DateTimeFormatPartTypes) =>
    Number(parts.find((candidate) => candidate.type === type)?.value);
  const [year, month, day] = [part("year"), part("month"), part("day")];
  return {
    year,
    month,
    day,
    hour: part("hour"),
    minute: part("minute"),
    second: part("second"),
    weekday: new Date(Date.UTC(year, month - 1, day)).getUTCDay(),
  };
}

/**
 * A day as "14 Jun 2025".
 *
 * @example
 * formatDate(1749899280000, "Europe/Copenhagen"); // "14 Jun 2025"
 */
export function formatDate(timeMs: number | null, zone: string): string {
  const t = localTime(timeMs, zone);
  return t === null ? MISSING : `${t.day} ${MONTHS[t.month - 1]} ${t.year}`;
}

/**
 * A day as "Saturday 14 June 2025".
 *
 * @example
 * formatLongDate(1749899280000, "Europe/Copenhagen"); // "Saturday 14 June 2025"
 */
export function formatLongDate(timeMs: number | null, zone: string): string {
  const t = localTime(timeMs, zone);
  return t === null ? MISSING : `${DAYS[t.weekday]} ${t.day} ${LONG_MONTHS[t.month - 1]} ${t.year}`;
}

/**
 * A 24-hour clock time, with seconds on request.
 *
 * @example
 * formatTime(1749899280000, "Europe/Copenhagen"); // "13:08"
 */
export function formatTime(
  timeMs: number | null,
  zone: string,
  seconds: "none" | "seconds" = "none",
): string {
  const t = localTime(timeMs, zone);
  if (t === null) return MISSING;
  const clock = `${two(t.hour)}:${two(t.minute)}`;
  return seconds === "seconds" ? `${clock}:${two(t.second)}` : clock;
}

/**
 * Day and time as "14 Jun 2025, 13:08".
 *
 * @example
 * formatDateTime(1749899280000, "Europe/Copenhagen"); // "14 Jun 2025, 13:08"
 */
export function formatDateTime(timeMs: number | null, zone: string): string {
  return localTime(timeMs, zone) === null
    ? MISSING
    : `${formatDate(timeMs, zone)}, ${formatTime(timeMs, zone)}`;
}

/**
 * From one clock time to another, "13:08–14:18".
 *
 * @example
 * formatTimeSpan(1749899280000, 1749903480000, "Europe/Copenhagen"); // "13:08–14:18"
 */
export function formatTimeSpan(startMs: number | null, endMs: number | null, zone: string): string {
  return `${formatTime(startMs, zone)}–${formatTime(endMs, zone)}`;
}

/**
 * Minutes that a zone's clock stands ahead of UTC at an instant; 0 when the instant is missing.
 *
 * @example
 * zoneOffsetMin(1749899280000, "Europe/Copenhagen"); // 120
 */
export function zoneOffsetMin(timeMs: number, zone: string): number {
  const t = localTime(timeMs, zone);
  if (t === null) return 0;
  const asUtc = Date.UTC(t.year, t.month - 1, t.day, t.hour, t.minute, t.second);
  return Math.round((asUtc - Math.floor(timeMs / 1000) * 1000) / 60000);
}

/**
 * ISO 8601 with the zone's offset, for exports and for the datetime attribute.
 *
 * @example
 * isoWithOffset(1749899280000, "Europe/Copenhagen"); // "2025-06-14T13:08:00+02:00"
 */
export function isoWithOffset(timeMs: number | null, zone: string): string {
  const t = localTime(timeMs, zone);
  if (t === null || timeMs === null) return "";
  const offset = zoneOffsetMin(timeMs, zone);
  const [sign, size] = [offset < 0 ? "-" : "+", Math.abs(offset)];
  const day = `${String(t.year).padStart(4, "0")}-${two(t.month)}-${two(t.day)}`;
  const clock = `${two(t.hour)}:${two(t.minute)}:${two(t.second)}`;
  return `${day}T${clock}${sign}${two(Math.floor(size / 60))}:${two(size % 60)}`;
}

/**
 * The day as a date box wants it.
 *
 * @example
 * dateInputValue(1749899280000, "Europe/Copenhagen"); // "2025-06-14"
 */
export function dateInputValue(timeMs: number | null, zone: string): string {
  return isoWithOffset(timeMs, zone).slice(0, 10);
}
