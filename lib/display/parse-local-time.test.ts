import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { formatTime } from "./format-time";
import { parseLocalTime } from "./parse-local-time";

/* Expected instants are ISO 8601 texts with the offset written out, read by the runtime. */
const at = (iso: string) => Date.parse(iso);
const COPENHAGEN = "Europe/Copenhagen";

describe("parseLocalTime", () => {
  const near = at("2025-06-14T13:40:00+02:00");

  it.each([
    ["13:08", "2025-06-14T13:08:00+02:00"],
    ["13:08:30", "2025-06-14T13:08:30+02:00"],
    ["13.08", "2025-06-14T13:08:00+02:00"],
    ["13.08.30", "2025-06-14T13:08:30+02:00"],
    [" 9:05 ", "2025-06-14T09:05:00+02:00"],
    ["02:00", "2025-06-14T02:00:00+02:00"],
  ])("reads %j on the day of the session", (text, iso) => {
    expect(parseLocalTime(text, near, COPENHAGEN)).toBe(at(iso));
  });

  it.each([
    "",
    "noon",
    "13",
    "24:00",
    "13:60",
    "13:08:60",
    "13:8",
    "-1:00",
    "13:08:30:10",
    "13:08 pm",
    "1308",
  ])("refuses %j", (text) => {
    expect(parseLocalTime(text, near, COPENHAGEN)).toBeNull();
  });

  it("takes the next day for a session that passes midnight", () => {
    const late = at("2025-06-14T23:50:00+02:00");
    expect(parseLocalTime("00:20", late, COPENHAGEN)).toBe(at("2025-06-15T00:20:00+02:00"));
    expect(parseLocalTime("23:10", late, COPENHAGEN)).toBe(at("2025-06-14T23:10:00+02:00"));
  });

  it("takes the day before when the session began after midnight", () => {
    const early = at("2025-06-15T00:10:00+02:00");
    expect(parseLocalTime("23:58", early, COPENHAGEN)).toBe(at("2025-06-14T23:58:00+02:00"));
  });

  // Directive 2000/84/EC: summer time ends at 01:00 UTC on the last Sunday of October, begins so in March.
  it("takes the nearer of the two when the clock shows an hour twice", () => {
    expect(parseLocalTime("02:30", at("2025-10-26T01:00:00+02:00"), COPENHAGEN)).toBe(
      at("2025-10-26T02:30:00+02:00"),
    );
    expect(parseLocalTime("02:30", at("2025-10-26T05:00:00+01:00"), COPENHAGEN)).toBe(
      at("2025-10-26T02:30:00+01:00"),
    );
  });

  it("refuses an hour that the clock skips that day", () => {
    expect(parseLocalTime("02:30", at("2025-03-30T04:00:00+02:00"), COPENHAGEN)).toBeNull();
    expect(parseLocalTime("03:30", at("2025-03-30T04:00:00+02:00"), COPENHAGEN)).toBe(
      at("2025-03-30T03:30:00+02:00"),
    );
  });

  it("counts in UTC when the zone is not known", () => {
    expect(parseLocalTime("13:08", near, "Nowhere/Atoll")).toBe(at("2025-06-14T13:08:00Z"));
  });

  it("is null without a time to be near to", () => {
    expect(parseLocalTime("13:08", NaN, COPENHAGEN)).toBeNull();
  });

  it("gives back every time of the last ten hours that formatTime wrote, in any zone", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: at("1990-01-01T00:00:00Z") / 1000, max: at("2040-01-01T00:00:00Z") / 1000 }),
        fc.integer({ min: -36_000, max: 36_000 }),
        fc.constantFrom("UTC", COPENHAGEN, "Pacific/Chatham", "America/St_Johns", "Pacific/Apia"),
        (nearS, awayS, zone) => {
          const timeMs = (nearS + awayS) * 1000;
          const read = parseLocalTime(formatTime(timeMs, zone, "seconds"), nearS * 1000, zone);
          expect(read).not.toBeNull();
          // The same clock time; where the clock shows it twice, the nearer one.
          expect(formatTime(read, zone, "seconds")).toBe(formatTime(timeMs, zone, "seconds"));
          expect(Math.abs((read ?? NaN) - nearS * 1000)).toBeLessThanOrEqual(Math.abs(awayS) * 1000);
        },
      ),
      { seed: 2026, numRuns: 300 },
    );
  });
});
