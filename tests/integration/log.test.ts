import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Database } from "@/db/client";
import { compareGear } from "@/lib/server/compare/compare-gear";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { filterChoices } from "@/lib/server/log/filter-choices";
import { listLog, listSpots } from "@/lib/server/log/list-log";
import { logCsv } from "@/lib/server/log/log-csv";
import { logQuery, parseCompareBy, parseLogFilter } from "@/lib/server/log/log-filter";
import { MPS_PER_KNOT } from "@/lib/units/speed";
import { makeSetup } from "@/tests/support/gear-rows";
import { makeSession } from "@/tests/support/session-rows";
import { makeUser, openTestDatabase, testContext } from "@/tests/support/test-database";

const DAY_MS = 86_400_000;
const FIRST_MS = Date.UTC(2025, 5, 1, 12);

let db: Database;
let close: () => Promise<void>;
let rider: ReturnType<typeof testContext>;
let stranger: ReturnType<typeof testContext>;
let gear: { a: Awaited<ReturnType<typeof makeSetup>>; b: Awaited<ReturnType<typeof makeSetup>> };

/** Sixty sessions, a day apart, ever faster: even ones on setup A in 12 kn, odd ones on B in 20 kn. */
beforeAll(async () => {
  ({ db, close } = await openTestDatabase());
  const riderId = (await makeUser(db)).id;
  rider = testContext(db, { userId: riderId });
  stranger = testContext(db, { userId: (await makeUser(db)).id });
  gear = { a: await makeSetup(rider, "A"), b: await makeSetup(rider, "B", { shimStackDeg: 0.5 }) };
  for (let day = 0; day < 60; day += 1) {
    const even = day % 2 === 0;
    const made = await makeSession(db, riderId, {
      startMs: FIRST_MS + day * DAY_MS,
      seconds: 600,
      speedMps: 6 + day * 0.05,
      overrides: {
        title: `Run ${day}`,
        spot: even ? "Slettestrand" : "Blokhus",
        discipline: day === 0 ? "wing" : "downwind",
        qualityGrade: day === 1 ? "C" : "A",
        windSpeedMps: day === 2 ? null : (even ? 12 : 20) * MPS_PER_KNOT,
        deletedAtMs: day === 59 ? FIRST_MS : null,
      },
    });
    if (day < 58) {
      const setupId = even ? gear.a.setup.id : gear.b.setup.id;
      await setGearSpans(rider, made.id, [{ setupId, startMs: null, endMs: null }]);
    }
  }
});
afterAll(() => close());

const titles = async (params: Record<string, string>) =>
  (await listLog(rider, parseLogFilter(params))).rows.map((row) => row.title);

describe("the log", () => {
  it("shows the newest page first, leaves deleted sessions out, and totals all of it", async () => {
    const log = await listLog(rider, parseLogFilter({}));
    expect([log.rows.length, log.pages, log.totals.sessions]).toEqual([50, 2, 59]);
    expect(log.rows[0]?.title).toBe("Run 58");
    expect(log.rows[1]?.setups).toEqual(["B"]);
    expect(log.totals.elapsedS).toBe(59 * 600);
    expect(await titles({ page: "2" })).toHaveLength(9);
    expect(await titles({ page: "99" })).toHaveLength(9);
  });

  it("narrows by front wing, any part, setup, discipline, spot, dates, wind and quality", async () => {
    expect(await titles({ frontWing: gear.a.wing.id })).toHaveLength(29);
    expect(await titles({ part: gear.b.wing.id })).toHaveLength(29);
    expect(await titles({ setup: gear.b.setup.id, discipline: "wing" })).toHaveLength(0);
    expect(await titles({ discipline: "wing" })).toEqual(["Run 0"]);
    expect(await titles({ spot: "Blokhus", to: "2025-06-04" })).toEqual(["Run 3", "Run 1"]);
    expect(await titles({ from: "2025-06-03", to: "2025-06-03" })).toEqual(["Run 2"]);
    expect(await titles({ windMin: "15", to: "2025-06-05" })).toEqual(["Run 3", "Run 1"]);
    expect(await titles({ windMax: "15", to: "2025-06-05" })).toEqual(["Run 4", "Run 0"]);
    expect(await titles({ quality: "B", to: "2025-06-03" })).toEqual(["Run 2", "Run 0"]);
  });

  it("sorts by a figure both ways and keeps rows without it last", async () => {
    expect((await titles({ sort: "best10s" }))[0]).toBe("Run 58");
    expect((await titles({ sort: "best10s", order: "asc" }))[0]).toBe("Run 0");
    const byWind = await titles({ sort: "wind", order: "asc", to: "2025-06-05" });
    expect(byWind.at(-1)).toBe("Run 2");
  });

  it("takes nonsense in the URL as absent and never as an error", async () => {
    const filter = parseLogFilter({
      sort: "1;drop table",
      order: "up",
      page: "-3",
      from: "soon",
      windMin: "x",
      quality: "Z",
    });
    expect(filter).toMatchObject({ sort: "start", order: "desc", page: 1 });
    expect(logQuery(filter)).toBe("");
    expect(parseCompareBy("nonsense")).toBe("setup");
  });

  it("writes the filter back as the query that reads the same", () => {
    const filter = parseLogFilter({
      frontWing: "w",
      windMin: "12.5",
      sort: "glide",
      order: "asc",
      page: "3",
    });
    const again = Object.fromEntries(new URLSearchParams(logQuery(filter, { page: 3 })));
    expect(parseLogFilter(again)).toEqual(filter);
  });

  it("is empty for a stranger and closed to nobody signed in", async () => {
    const theirs = await listLog(stranger, parseLogFilter({ frontWing: gear.a.wing.id }));
    expect([theirs.rows.length, theirs.totals.sessions, theirs.hasAny]).toEqual([0, 0, false]);
    expect(await listSpots(stranger)).toEqual([]);
    await expect(listLog(testContext(db), parseLogFilter({}))).rejects.toMatchObject({
      code: "unauthenticated",
    });
    await expect(filterChoices(testContext(db))).rejects.toMatchObject({ code: "unauthenticated" });
  });

  it("offers what can be chosen", async () => {
    const choices = await filterChoices(rider);
    expect(choices.spots).toEqual(["Blokhus", "Slettestrand"]);
    expect(choices.setups.map((choice) => choice.label).sort()).toEqual(["A", "B"]);
    expect(choices.frontWings).toHaveLength(2);
  });

  it("gives all that is filtered as CSV with units in every head", async () => {
    const text = await logCsv(rider, parseLogFilter({ spot: "Blokhus" }), { speed: "kn", distance: "NM" });
    const lines = text.trim().split("\r\n");
    expect(lines).toHaveLength(1 + 29);
    expect(lines[0]).toContain("Best 10 s kn");
    expect(lines[1]).toContain("+02:00");
    await expect(
      logCsv(testContext(db), parseLogFilter({}), { speed: "kn", distance: "km" }),
    ).rejects.toMatchObject({ code: "unauthenticated" });
  });
});

describe("the plain comparison", () => {
  it("groups tagged sessions by setup, part and adjustment", async () => {
    const bySetup = await compareGear(rider, parseLogFilter({}), "setup");
    expect(bySetup.map((group) => [group.name, group.sessions, group.days])).toEqual(
      expect.arrayContaining([
        ["A", 29, 29],
        ["B", 29, 29],
      ]),
    );
    const byShim = await compareGear(rider, parseLogFilter({}), "shim");
    expect(byShim.map((group) => group.name).sort()).toEqual(["+½° shim", "no shim"]);
    const byMast = await compareGear(rider, parseLogFilter({}), "mast_position");
    expect(byMast.map((group) => group.name)).toEqual(["Mast position not entered"]);
  });

  it("takes the median of what was ridden and nothing of a stranger", async () => {
    const filter = parseLogFilter({ setup: gear.a.setup.id });
    const [only] = await compareGear(rider, filter, "front_wing");
    expect(only?.name).toBe("Aldervane Long-rail 850");
    // Setup A was ridden on days 0, 2, ... 56 at 6 + 0.05 day m/s: the median is that of day 28.
    expect(only?.figures.best500mMps?.median).toBeCloseTo(6 + 28 * 0.05, 1);
    expect(only?.figures.onFoilShare?.median).toBeCloseTo(1, 6);
    expect(only?.figures.bumpRidingSpeedMps).toBeNull();
    expect(await compareGear(stranger, filter, "setup")).toEqual([]);
    await expect(compareGear(testContext(db), filter, "setup")).rejects.toMatchObject({
      code: "unauthenticated",
    });
  });
});
