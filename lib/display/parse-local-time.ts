import { localTime, zoneOffsetMin } from "./format-time";

const CLOCK = /^(\d{1,2})\s*[:.]\s*(\d{2})(?:\s*[:.]\s*(\d{2}))?$/;
const HOUR_MS = 3_600_000;
/** The right day lies within half a day of the session, or within half of the 25-hour day that ends summer time. */
const NEAR_MS = 12.5 * HOUR_MS;

/**
 * A clock time as a rider types it ("13:08", "13:08:30", "13.08"), as UTC epoch milliseconds. The day is the one that puts
 * it nearest to `nearMs`, so that a session may pass midnight. An hour that the clock shows twice is the nearer of
 * the two. Null for what is no clock time, for one that the clock skips that day, and for a missing `nearMs`; an unknown
 * zone counts as UTC.
 *
 * @example
 * parseLocalTime("13:08", 1749900000000, "Europe/Copenhagen"); // 1749899280000
 * @example
 * parseLocalTime("25:00", 1749900000000, "Europe/Copenhagen"); // null
 */
export function parseLocalTime(text: string, nearMs: number, zone: string): number | null {
  const match = CLOCK.exec(text.trim());
  const near = localTime(nearMs, zone);
  if (match === null || near === null) return null;
  const [hour, minute, second] = [Number(match[1]), Number(match[2]), Number(match[3] ?? 0)];
  if (hour > 23 || minute > 59 || second > 59) return null;
  let best: number | null = null;
  for (const days of [-1, 0, 1]) {
    const asUtc = Date.UTC(near.year, near.month - 1, near.day + days, hour, minute, second);
    // The offset before and after the time: they differ on the days when the clock is changed.
    for (const aroundMs of [asUtc - 24 * HOUR_MS, asUtc + 24 * HOUR_MS]) {
      const timeMs = asUtc - zoneOffsetMin(aroundMs, zone) * 60_000;
      const shown = localTime(timeMs, zone);
      if (shown?.hour !== hour || shown.minute !== minute) continue;
      const isNear = Math.abs(timeMs - nearMs) <= NEAR_MS;
      if (isNear && (best === null || Math.abs(timeMs - nearMs) < Math.abs(best - nearMs))) best = timeMs;
    }
  }
  return best;
}
