import { describe, expect, it } from "vitest";
import type { Best, Figures, Withheld } from "@/lib/analysis/analysis";
import { bestRows, bumpRows, mainRows, wayRows } from "./figure-rows";

const units = { speed: "kn", distance: "km" } as const;
/** One knot is 1852 m an hour (International Hydrographic Conference, Monaco 1929). */
const KNOT = 1852 / 3600;
const tooShort: Withheld = { withheld: "too_short" };
const best = (knots: number, seKnots: number): Best => ({
  startMs: 0,
  endMs: 10_000,
  speedMps: knots * KNOT,
  seMps: seKnots * KNOT,
});

function figures(overrides: Partial<Figures> = {}): Figures {
  return {
    startMs: 0,
    endMs: 600_000,
    elapsedS: 600,
    movingS: 590,
    waterDistanceM: 4200,
    waterDistanceSeM: 30,
    onFoilDistanceM: 3000,
    onFoilTimeS: 400,
    onFoilShareOfDistance: 0.714,
    onFoilShareOfTime: 0.667,
    takeoffs: 2,
    touchdowns: 1,
    longestSegmentM: 450,
    longestSegmentS: 70,
    bests: {
      s2: best(20, 0.33),
      s10: best(18, 0.04),
      s60: best(16, 0.001),
      s600: { withheld: "quality" },
      s3600: tooShort,
      m100: tooShort,
      m250: tooShort,
      m500: tooShort,
      m1000: tooShort,
      nm: tooShort,
    },
    bestTens: [],
    bestTensMeanMps: null,
    bumps: null,
    glide: null,
    ...overrides,
  };
}

describe("figure rows", () => {
  it("says of every best its standard error, never as none at all", () => {
    const rows = bestRows(figures(), units);
    expect(rows.slice(0, 3).map((row) => [row.value, row.unit, row.error])).toEqual([
      ["20.0", "kn", "0.3"],
      ["18.0", "kn", "0.04"],
      ["16.0", "kn", "<0.01"],
    ]);
  });

  it("gives the reason of a figure that is withheld or missing", () => {
    const all = [...bestRows(figures(), units), ...mainRows(figures(), "downwind", units)];
    const missing = all.filter((row) => row.value === null);
    expect(missing.map((row) => row.note)).toEqual([
      "quality below B",
      ...Array<string>(6).fill("too short for it"),
      "fewer than five",
      "no bump rides",
      "too few lulls",
    ]);
  });

  it("calls the glide ratio of a downwinder apparent, and gives a quarter of its interval as its error", () => {
    const glide = { ratio: 14.2, ratioLow: 12.4, ratioHigh: 16, lulls: 60 };
    const row = mainRows(figures({ glide }), "downwind", units)[1];
    expect([row?.label, row?.value, row?.error]).toEqual(["Glide ratio, apparent", "14.2", "0.9"]);
    expect(mainRows(figures({ glide }), "wing", units)[1]?.label).toBe("Glide ratio");
  });

  it("shows take-offs and touchdowns each on its own", () => {
    const rows = wayRows(figures(), units);
    expect(rows.slice(-2).map((row) => `${row.label} ${row.value}`)).toEqual(["Take-offs 2", "Touchdowns 1"]);
  });

  it("has no rows of bumps without a bump, and a dash for what one ride cannot tell", () => {
    expect(bumpRows(figures(), units)).toEqual([]);
    const bumps = {
      ridingSpeedMps: 8,
      ridingSpeedSeMps: 0.1,
      rides: 1,
      ridesPerKm: 0.3,
      ridesPerHour: 9,
      gainMpsMean: 1,
      intervalSMedian: Number.NaN,
      lullsKeptShare: Number.NaN,
    };
    const missing = bumpRows(figures({ bumps }), units).filter((row) => row.value === null);
    expect(missing.map((row) => row.note)).toEqual(["one ride alone", "no lulls"]);
  });
});
