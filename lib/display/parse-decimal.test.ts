import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { parseDecimal } from "./parse-decimal";

describe("a number as a person types it", () => {
  it.each([
    ["84.5", 84.5],
    ["84,5", 84.5],
    [" 84,5 ", 84.5],
    ["1 234,5", 1234.5],
    ["1\u00a0234.5", 1234.5],
    ["1\u202f234", 1234],
    ["1.234,5", 1234.5],
    ["1,234.5", 1234.5],
    ["1,234,567", 1234567],
    ["1.234.567", 1234567],
    ["\u22120,5", -0.5],
    ["+0.5", 0.5],
    [".5", 0.5],
    ["5,", 5],
    ["0", 0],
  ])("reads %j as %d", (text, value) => {
    expect(parseDecimal(text)).toBe(value);
  });

  it.each([
    "",
    " ",
    "-",
    ".",
    ",",
    "12abc",
    "1e5",
    "0x10",
    "Infinity",
    "NaN",
    "1,23,4",
    "1.2.3",
    "1,234.5.6",
    "12,34.5",
    "--5",
    "5-",
  ])("refuses %j", (text) => {
    expect(parseDecimal(text)).toBeNull();
  });

  it("takes the unit when it is pasted along, and no other", () => {
    expect(parseDecimal("84,5 kg", "kg")).toBe(84.5);
    expect(parseDecimal("900 cm²", "cm²")).toBe(900);
    expect(parseDecimal("84,5 lb", "kg")).toBeNull();
  });

  it("reads back what was written with point or comma", () => {
    fc.assert(
      fc.property(fc.integer({ min: -1e7, max: 1e7 }), (thousandths) => {
        const text = (thousandths / 1000).toFixed(3);
        expect(parseDecimal(text)).toBe(Number(text));
        expect(parseDecimal(text.replace(".", ","))).toBe(Number(text));
      }),
      { seed: 2026 },
    );
  });
});
