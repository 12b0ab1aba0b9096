import { describe, expect, test } from "vitest";
import { endsOf, placeNear, sessionTitle } from "./session-title";

// Beaches of the Jammerbugt to a hundredth of a degree, read off a map; 1 km is about 0.009° of latitude.
const slettestrand = { name: "Slettestrand", latDeg: 57.15, lonDeg: 9.36 };
const blokhus = { name: "Blokhus", latDeg: 57.25, lonDeg: 9.57 };
const from = { latDeg: 57.151, lonDeg: 9.361 };
const to = { latDeg: 57.252, lonDeg: 9.572 };

describe("a session's title", () => {
  test("goes from place to place when both have names", () => {
    expect(sessionTitle("downwind", { from, to }, [slettestrand, blokhus])).toBe("Slettestrand to Blokhus");
  });

  test("says direction and coordinates without names, and one name when there is one", () => {
    expect(sessionTitle("downwind", { from, to }, [])).toBe("Downwinder heading NE from 57.15° N 9.36° E");
    expect(sessionTitle("downwind", { from, to }, [slettestrand])).toBe(
      "Downwinder heading NE from Slettestrand",
    );
    expect(sessionTitle("downwind", { from, to }, [blokhus])).toBe("Downwinder to Blokhus");
  });

  test("says one place when it ends where it began", () => {
    expect(sessionTitle("wing", { from, to: from }, [slettestrand])).toBe("Wing session at Slettestrand");
    expect(sessionTitle("other", { from, to: from }, [])).toBe("Session at 57.15° N 9.36° E");
  });

  test("names south and west, and heads the short way over the antimeridian", () => {
    const ends = { from: { latDeg: -17.5, lonDeg: 179.95 }, to: { latDeg: -17.5, lonDeg: -179.95 } };
    expect(sessionTitle("wing", ends, [])).toBe("Wing session heading E from 17.50° S 179.95° E");
  });
});

describe("the place near a position", () => {
  test("is the nearest within 1.5 km, or none", () => {
    const near = { name: "Near", latDeg: 57.152, lonDeg: 9.36 };
    expect(placeNear([slettestrand, near, blokhus], { latDeg: 57.153, lonDeg: 9.36 })?.name).toBe("Near");
    // 0.014° of latitude is 1.56 km.
    expect(placeNear([slettestrand], { latDeg: 57.164, lonDeg: 9.36 })).toBeNull();
  });
});

test("a row that does not say where it began has no ends", () => {
  const row = { startLatDeg: 1, startLonDeg: 2, endLatDeg: 3, endLonDeg: null };
  expect(endsOf(row)).toBeNull();
  expect(endsOf({ ...row, endLonDeg: 4 })).toEqual({
    from: { latDeg: 1, lonDeg: 2 },
    to: { latDeg: 3, lonDeg: 4 },
  });
});
