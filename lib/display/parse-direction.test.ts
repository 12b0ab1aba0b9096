import { describe, expect, it } from "vitest";
import { parseDirection } from "./parse-direction";

describe("parseDirection", () => {
  // The sixteen points are 22.5 degrees apart, clockwise from north (compass rose, common practice, no source).
  it.each([
    ["N", 0],
    ["nne", 22.5],
    ["NE", 45],
    ["ENE", 67.5],
    ["E", 90],
    ["ESE", 112.5],
    ["SE", 135],
    ["SSE", 157.5],
    ["S", 180],
    ["SSW", 202.5],
    ["SW", 225],
    ["WSW", 247.5],
    ["w", 270],
    ["WNW", 292.5],
    ["NW", 315],
    ["NNW", 337.5],
    ["west-southwest", 247.5],
    ["West South West", 247.5],
    ["south-west", 225],
    ["southwesterly", 225],
    ["from the north east", 45],
    ["w.s.w.", 247.5],
    ["north\u2013northwest", 337.5],
  ])("reads the compass point %j as %d degrees", (text, degrees) => {
    expect(parseDirection(text)).toBe(degrees);
  });

  it.each([
    ["0", 0],
    ["247", 247],
    ["247°", 247],
    [" 247,5 deg", 247.5],
    ["045", 45],
    ["90 degrees", 90],
    ["225° true", 225],
    ["360", 0],
  ])("reads %j as %d degrees", (text, degrees) => {
    expect(parseDirection(text)).toBe(degrees);
  });

  it.each(["", "  ", "361", "-10", "WWS", "NEN", "SN", "onshore", "west 10", "NaN", "Infinity", "degrees"])(
    "refuses %j",
    (text) => {
      expect(parseDirection(text)).toBeNull();
    },
  );
});
