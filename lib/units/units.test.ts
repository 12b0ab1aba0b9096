import { readFileSync } from "node:fs";
import path from "node:path";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { distanceFromM, distanceToM, METRES_PER_MILE, METRES_PER_NM, type DistanceUnit } from "./length";
import { MPS_PER_KMH, MPS_PER_KNOT, MPS_PER_MPH, speedFromMps, speedToMps, type SpeedUnit } from "./speed";

type Table = {
  units: { id: string; value: number }[];
  speeds_from_kn: { kn: number; mps: number; kmh: number; mph: number }[];
  speeds_from_mps: { speed_mps: number; kn: number; kmh: number }[];
};

/* SI Brochure 9th ed., NIST SP 811 (2008), as gathered in fixtures/checks/units.json. */
const table = JSON.parse(
  readFileSync(path.resolve(import.meta.dirname, "../../fixtures/checks/units.json"), "utf8"),
) as Table;

const unitValue = (id: string) => table.units.find((unit) => unit.id === id)?.value ?? NaN;

describe("units against the SI Brochure and NIST SP 811", () => {
  it.each([
    ["kn_to_mps", MPS_PER_KNOT],
    ["kmh_to_mps", MPS_PER_KMH],
    ["mph_to_mps", MPS_PER_MPH],
    ["nmi_m", METRES_PER_NM],
    ["statute_mile_m", METRES_PER_MILE],
  ])("%s has its exact value", (id, value) => {
    // Exact by definition; one rounding of a double is allowed.
    expect(Math.abs(value / unitValue(id) - 1)).toBeLessThanOrEqual(2.3e-16);
  });

  it.each(table.speeds_from_kn)("$kn kn is $kmh km/h and $mph mph", ({ kn, mps, kmh, mph }) => {
    expect(speedToMps(kn, "kn")).toBeCloseTo(mps, 12);
    expect(speedFromMps(mps, "km/h")).toBeCloseTo(kmh, 12);
    expect(speedFromMps(mps, "mph")).toBeCloseTo(mph, 12);
  });

  it.each(table.speeds_from_mps)("$speed_mps m/s is $kn kn", ({ speed_mps, kn, kmh }) => {
    expect(speedFromMps(speed_mps, "kn")).toBeCloseTo(kn, 12);
    expect(speedFromMps(speed_mps, "km/h")).toBeCloseTo(kmh, 12);
  });
});

describe("units there and back", () => {
  const value = fc.double({ min: -1e7, max: 1e7, noNaN: true });

  it("a speed returns within 1e-9 of itself from every unit", () => {
    fc.assert(
      fc.property(value, fc.constantFrom<SpeedUnit>("kn", "km/h", "mph", "m/s"), (mps, unit) => {
        const back = speedToMps(speedFromMps(mps, unit), unit);
        expect(Math.abs(back - mps)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(mps)));
      }),
      { seed: 2026 },
    );
  });

  it("a distance returns within 1e-9 of itself from every unit", () => {
    fc.assert(
      fc.property(value, fc.constantFrom<DistanceUnit>("NM", "km", "mi"), (metres, unit) => {
        const back = distanceToM(distanceFromM(metres, unit), unit);
        expect(Math.abs(back - metres)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(metres)));
      }),
      { seed: 2026 },
    );
  });

  it("keeps a missing value missing", () => {
    expect(speedFromMps(NaN, "kn")).toBeNaN();
    expect(distanceToM(NaN, "km")).toBeNaN();
  });
});
