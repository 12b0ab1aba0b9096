import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { csvRows } from "@/tests/support/reading";
import { parseDecimal } from "./parse-decimal";

describe("parseDecimal", () => {
  // Source: GPX schemas; verdicts of libxml2 2.9.14 and xmlschema 1.10.0. Ranges are not its business.
  it.each(csvRows("checks/gpx_lexical.csv"))("knows the decimals of $id: '$lexical'", (row) => {
    const lexical = row["lexical"] ?? "";
    const isDecimal = /^\s*[+-]?(\d+\.?\d*|\.\d+)\s*$/.test(lexical);
    expect(Number.isNaN(parseDecimal(lexical))).toBe(!isDecimal);
    if (isDecimal) expect(parseDecimal(lexical)).toBe(Number(lexical));
  });

  it("reads a position close to zero as programs print it, and no other exponent", () => {
    expect(parseDecimal("9.1E-4")).toBe(9.1e-4);
    expect(parseDecimal("1e1")).toBeNaN();
    expect(parseDecimal("1e400")).toBeNaN();
  });

  it("gives the very double of the engine's own conversion", () => {
    fc.assert(
      fc.property(fc.bigInt(-(10n ** 20n), 10n ** 20n), fc.nat(18), (whole, decimals) => {
        const digits = String(whole < 0n ? -whole : whole).padStart(decimals + 1, "0");
        const cut = digits.length - decimals;
        const text = `${whole < 0n ? "-" : ""}${digits.slice(0, cut)}.${digits.slice(cut)}`;
        expect(parseDecimal(text)).toBe(Number(text));
      }),
      { seed: 20250614, numRuns: 2000 },
    );
  });
});
