import { describe, expect, it } from "vitest";
import {
  dateInputValue,
  formatDate,
  formatDateTime,
  formatLongDate,
  formatTime,
  formatTimeSpan,
  isoWithOffset,
  isTimeZone,
  zoneOffsetMin,
} from "./format-time";

const CPH = "Europe/Copenhagen";
/** 2025-06-14T11:08:00Z, a Saturday (ISO 8601 calendar). */
const START = Date.UTC(2025, 5, 14, 11, 8);

describe("dates and times of a zone", () => {
  it("shows the venue's clock, not the machine's", () => {
    expect(formatTime(START, CPH)).toBe("13:08");
    expect(formatTime(START, "UTC")).toBe("11:08");
    expect(formatTime(START, "Australia/Adelaide", "seconds")).toBe("20:38:00");
    expect(formatTimeSpan(START, START + 70 * 60000, CPH)).toBe("13:08–14:18");
  });

  it("writes days with their month as a word", () => {
    expect(formatDate(START, CPH)).toBe("14 Jun 2025");
    expect(formatDate(Date.UTC(2026, 8, 3), "UTC")).toBe("3 Sep 2026");
    expect(formatLongDate(START, CPH)).toBe("Saturday 14 June 2025");
    expect(formatDateTime(START, CPH)).toBe("14 Jun 2025, 13:08");
  });

  it("is a day further on where the day has already begun", () => {
    const evening = Date.UTC(2025, 11, 31, 23, 30);
    expect(formatDate(evening, "UTC")).toBe("31 Dec 2025");
    expect(formatDate(evening, CPH)).toBe("1 Jan 2026");
    expect(dateInputValue(evening, CPH)).toBe("2026-01-01");
  });

  it("follows the change to summer time, 30 March 2025 01:00 UTC (Directive 2000/84/EC)", () => {
    const change = Date.UTC(2025, 2, 30, 1);
    expect(formatTime(change - 1, CPH, "seconds")).toBe("01:59:59");
    expect(formatTime(change, CPH, "seconds")).toBe("03:00:00");
    expect(zoneOffsetMin(change - 1, CPH)).toBe(60);
    expect(zoneOffsetMin(change, CPH)).toBe(120);
  });

  it("exports ISO 8601 with the offset, and the text names the same instant", () => {
    for (const zone of [CPH, "UTC", "America/St_Johns", "Pacific/Chatham"]) {
      const text = isoWithOffset(START, zone);
      expect(Date.parse(text)).toBe(START);
    }
    expect(isoWithOffset(START, CPH)).toBe("2025-06-14T13:08:00+02:00");
    expect(isoWithOffset(START, "America/St_Johns")).toBe("2025-06-14T08:38:00-02:30");
  });

  it("shows a dash for what is missing and UTC for a zone nobody knows", () => {
    expect(formatDate(null, CPH)).toBe("–");
    expect(formatTime(NaN, CPH)).toBe("–");
    expect(isoWithOffset(1e300, CPH)).toBe("");
    expect(isTimeZone("Nowhere/Else")).toBe(false);
    expect(isTimeZone("")).toBe(false);
    expect(formatTime(START, "Nowhere/Else")).toBe("11:08");
  });
});
