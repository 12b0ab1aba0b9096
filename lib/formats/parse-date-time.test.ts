import { describe, expect, it } from "vitest";
import { csvRows } from "@/tests/support/reading";
import { hasZone, parseDateTime } from "./parse-date-time";

describe("parseDateTime", () => {
  // Source: W3C XML Schema Part 2, dateTime; verdicts of xmlschema 1.10.0, instants by exact fractions.
  it.each(csvRows("checks/gpx_datetime.csv"))("agrees with XML Schema on $id: '$lexical'", (row) => {
    const value = parseDateTime(row["lexical"] ?? "");
    expect(Number.isFinite(value)).toBe(row["valid_xmlschema"] === "true");
    // Year -1 has no instant in the table (its meaning changed between XML Schema 1.0 and 1.1), nor has 12024.
    const expected = row["unix_seconds"] || row["gnu_date_unix_seconds"];
    if (row["valid_xmlschema"] === "true" && expected) {
      // A double holds today's epoch milliseconds to 0.0003 ms.
      expect(value).toBeCloseTo(Number(expected) * 1000, 3);
    }
  });

  it("agrees with the engine's own reader on every day of four centuries", () => {
    for (let day = Date.UTC(1900, 0, 1); day < Date.UTC(2300, 0, 1); day += 86_400_000) {
      const text = new Date(day).toISOString();
      if (parseDateTime(text) !== day) expect(parseDateTime(text), text).toBe(day);
    }
  });

  it("tells whether the zone is named", () => {
    expect(hasZone("2024-06-01T12:00:00")).toBe(false);
    expect(hasZone("2024-06-01T12:00:00Z ")).toBe(true);
    expect(hasZone("2024-06-01T12:00:00-09:30")).toBe(true);
  });
});
