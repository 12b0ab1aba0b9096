import { describe, expect, it } from "vitest";
import { type Scored, scoreCorpus } from "@/tests/support/accuracy/corpus";
import { cellOf, coverageOf, STATED } from "@/tests/support/accuracy/table";

/**
 * Made sessions with known truth (waves by the dispersion relation, a parabolic foil polar; tests/support/sea), recorded by receivers whose
 * errors differ in kind. Seeds other than those the analysis was worked on with. Bounds are what was measured and about a third more,
 * so that a change for the worse shows and a changed seed does not.
 */
const RECEIVERS = [
  "low",
  "mid",
  "high",
  "uneven",
  "bursts",
  "coarse",
  "white",
  "phone",
  "doppler",
  "lagging",
];
const scored = scoreCorpus({
  rides: [
    { kind: "downwind", seed: 401 },
    { kind: "downwind", seed: 402 },
    { kind: "downwind", seed: 403 },
    { kind: "wing", seed: 404 },
    { kind: "wing", seed: 405 },
    { kind: "shuttle", seed: 406 },
  ],
  receivers: RECEIVERS,
  minutes: 18,
});
const of = (receiver: string): Scored[] => scored.filter((s) => s.receiver === receiver);
const middle = (receiver: string, figure: string): number => cellOf(of(receiver), figure)?.middle ?? NaN;

/** Receivers that record the time as it is and do not filter. */
const TRUE_TO_TIME = RECEIVERS.filter((r) => r !== "lagging");

describe("made sessions by receivers of many kinds", () => {
  it.each(TRUE_TO_TIME)("%s: every flight is found and no other, its ends within a second", (receiver) => {
    expect(middle(receiver, "flightF1")).toBeGreaterThanOrEqual(0.98);
    expect(middle(receiver, "takeoffS")).toBeLessThanOrEqual(1);
    // Whole seconds cut off half a second and more of the time.
    expect(middle(receiver, "touchdownS")).toBeLessThanOrEqual(receiver === "coarse" ? 1.4 : 1);
  });

  it.each([
    // A mean of two raw fixes costs 3 % (low) and 6 % (mid) over 2 s, 1.1 and 2.2 % over 10 s, 0.35 and 0.75 % over a minute.
    ["low", { foilDistPct: 1, s2Pct: 4, s10Pct: 1.2, m500Pct: 0.5, nmPct: 0.5 }],
    ["mid", { foilDistPct: 1, s2Pct: 6, s10Pct: 2.2, m500Pct: 0.8, nmPct: 0.7 }],
    ["high", { foilDistPct: 1.5, s10Pct: 5, m500Pct: 1.9, nmPct: 1.2 }],
    ["uneven", { foilDistPct: 1.2, s2Pct: 6, s10Pct: 3, m500Pct: 1.2, nmPct: 1 }],
    // Without the search for bursts these were 29 and 3.4 %.
    ["bursts", { foilDistPct: 1.2, s2Pct: 6, s10Pct: 1.8, m500Pct: 0.8, nmPct: 0.8 }],
    // Without the evening of slipped seconds the first was 15 %.
    ["coarse", { foilDistPct: 1.2, s2Pct: 6, s10Pct: 1.5, m500Pct: 0.8, nmPct: 0.6 }],
    ["white", { foilDistPct: 1.5, s10Pct: 3, m500Pct: 1.2, nmPct: 1 }],
    // Without passing over short gaps the last was 10 %.
    ["phone", { foilDistPct: 1.6, s2Pct: 6, s10Pct: 2.5, m500Pct: 1.2, nmPct: 1 }],
    ["doppler", { foilDistPct: 1, s2Pct: 2.5, s10Pct: 1.2, m500Pct: 0.8, nmPct: 0.8 }],
  ])("%s: ways and bests lie within what the noise allows", (receiver, bounds) => {
    for (const [figure, bound] of Object.entries(bounds))
      expect(middle(receiver, figure), figure).toBeLessThanOrEqual(bound);
  });

  it("finds the wind and the turns of a wing session by every receiver", () => {
    const wing = scored.filter((s) => s.kind === "wing");
    expect(cellOf(wing, "turnF1")?.middle).toBeGreaterThanOrEqual(0.96);
    expect(cellOf(wing, "windDeg")?.middle).toBeLessThanOrEqual(8);
  });

  it("states standard errors that hold the truth about as often as they claim, figure by figure", () => {
    const honest = scored.filter((s) => s.receiver !== "lagging");
    for (const figure of STATED) {
      const coverage = coverageOf(honest, figure);
      // 68 and 95 % are claimed. Sessions of one ride share its truth, so some fifty values leave about ten points of chance.
      expect(coverage?.within1, figure).toBeGreaterThanOrEqual(0.55);
      expect(coverage?.within196, figure).toBeGreaterThanOrEqual(0.86);
    }
    expect(coverageOf(honest, null)?.within1).toBeGreaterThanOrEqual(0.63);
    expect(coverageOf(honest, null)?.within196).toBeGreaterThanOrEqual(0.91);
  });

  it("takes the upward bias off maxima: the mean error of each best is a small part of its stated error", () => {
    const honest = scored.filter((s) => s.receiver !== "lagging");
    const means = Object.fromEntries(
      ["s2", "s10", "m500", "nm"].map((figure) => [
        figure,
        Math.abs(coverageOf(honest, figure)?.meanInSe ?? NaN),
      ]),
    );
    // 0.3 is wanted, and met over 2 and 10 s. Over 500 m and the mile poor receivers still lengthen the way by 0.2 %.
    expect(means.s2).toBeLessThanOrEqual(0.3);
    expect(means.s10).toBeLessThanOrEqual(0.3);
    expect(means.m500).toBeLessThanOrEqual(0.6);
    expect(means.nm).toBeLessThanOrEqual(0.65);
  });

  it("says that a watch which filters heavily cuts tops off: errors wide enough, though the lag itself cannot be seen", () => {
    expect(coverageOf(of("lagging"), null)?.within196).toBeGreaterThanOrEqual(0.8);
    // Positions alone do not tell when they were true: edges stay late by the lag of about 3 s.
    expect(middle("lagging", "takeoffBiasS")).toBeGreaterThan(2);
  });
});
