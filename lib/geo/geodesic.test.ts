import { readFileSync } from "node:fs";
import path from "node:path";

import { describe, expect, it } from "vitest";

import { distanceM, localStepM } from "./distance-m";
import { destination, geodesicLine } from "./geodesic";
import { wrapLongitudeDeg } from "./longitude";

/** Rows of a reference table; quoted fields hold commas only in the last two columns, which are not read. */
function table(name: string): Record<string, string>[] {
  const file = path.resolve(import.meta.dirname, "../../fixtures/checks", name);
  const [head, ...lines] = readFileSync(file, "utf8").trim().split(/\r?\n/);
  const names = (head ?? "").split(",");
  return lines.map((line) => {
    const cells = line.split(",");
    return Object.fromEntries(names.map((column, i) => [column, cells[i] ?? ""]));
  });
}

const num = (row: Record<string, string>, column: string) => Number(row[column]);

describe("geodesics against the GeodTest set", () => {
  // Source: Karney, GeodTest (2010, doi 10.5281/zenodo.32156) and library cases, fixtures/checks/geodesic_geodtest.csv.
  // Tolerance 2e-8 m: two other programs agree to 8e-9 m on these rows; the library claims 15 nm.
  it.each(table("geodesic_geodtest.csv"))("$id ($class): inverse and direct agree with the table", (row) => {
    const [lat1, lon1, lat2, lon2] = ["lat1_deg", "lon1_deg", "lat2_deg", "lon2_deg"].map((c) =>
      num(row, c),
    ) as [number, number, number, number];
    const length = num(row, "s12_m");
    expect(Math.abs(geodesicLine(lat1, lon1, lat2, lon2).distanceM - length)).toBeLessThan(2e-8);
    const reached = destination({ latDeg: lat1, lonDeg: lon1 }, num(row, "azi1_deg"), length);
    // A tenth of a micrometre on the ground; longitudes blow up by 1 / cos lat near the poles.
    const north = (reached.latDeg - lat2) * 111_000;
    const east = wrapLongitudeDeg(reached.lonDeg - lon2) * 111_320 * Math.cos((lat2 * Math.PI) / 180);
    expect(Math.hypot(north, east)).toBeLessThan(1e-7);
  });
});

describe("short steps", () => {
  const rows = table("geodesic_local.csv");

  // Source: 40-digit quadrature of the geodesic integrals, checked by two programs to 8e-9 m (fixtures/checks/geodesic_local.csv).
  it.each(rows)("$id ($class, $s12_m m): distance is the geodesic", (row) => {
    const s12 = num(row, "s12_m");
    const got = distanceM(
      num(row, "lat1_deg"),
      num(row, "lon1_deg"),
      num(row, "lat2_deg"),
      num(row, "lon2_deg"),
    );
    // The metric wants 1 ppm; the local formula promises 0.01 ppm below 1 km, and 13 decimals of a degree are 1e-8 m.
    expect(Math.abs(got - s12)).toBeLessThan(1e-8 * s12 + 2e-8);
  });

  it.each(rows.filter((row) => num(row, "s12_m") < 1000 && Math.abs(num(row, "lat1_deg")) < 80))(
    "$id: the bearing at the start is that of the table",
    (row) => {
      const line = geodesicLine(
        num(row, "lat1_deg"),
        num(row, "lon1_deg"),
        num(row, "lat2_deg"),
        num(row, "lon2_deg"),
      );
      // 14 decimals of a degree are 1e-9 m: over 1 m that turns the bearing by 1e-7 degrees.
      const off = wrapLongitudeDeg(line.bearingDeg - num(row, "azi1_deg"));
      expect(Math.abs(off)).toBeLessThan(1e-6);
    },
  );

  it("cross the antimeridian the short way round", () => {
    expect(localStepM(10, 179.9999, 10, -179.9999)).toBeCloseTo(localStepM(10, 0, 10, 0.0002), 6);
  });

  it("give NaN when a coordinate is missing", () => {
    expect(distanceM(NaN, 0, 0, 0)).toBeNaN();
    expect(geodesicLine(0, NaN, 0, 0)).toEqual({ distanceM: NaN, bearingDeg: NaN, bearingAtEndDeg: NaN });
    expect(destination({ latDeg: 0, lonDeg: 0 }, NaN, 1)).toEqual({ latDeg: NaN, lonDeg: NaN });
  });
});

describe("published survey lines", () => {
  const modern = table("geodesic_survey.csv").filter((row) => /WGS|GRS/.test(row.ellipsoid ?? ""));

  // Source: GDA technical manual, Flinders Peak to Buninyong on GRS80, which differs from WGS84 by 0.1 mm in the minor axis.
  it.each(modern)("$id: the length is the printed one to its millimetres", (row) => {
    const got = distanceM(
      num(row, "lat1_deg"),
      num(row, "lon1_deg"),
      num(row, "lat2_deg"),
      num(row, "lon2_deg"),
    );
    expect(Math.abs(got - num(row, "s12_m"))).toBeLessThan(num(row, "tol_m") + 0.001);
  });

  it("has at least one line on a modern ellipsoid", () => {
    expect(modern.length).toBeGreaterThan(0);
  });
});
