import { describe, expect, test } from "vitest";
import { verdictWords, type ReadVerdict } from "./file-verdict";

const read: ReadVerdict = {
  kind: "read",
  entryName: "",
  sessionId: "s",
  title: "Slettestrand to Blokhus",
  startMs: 0,
  timeZone: "UTC",
  waterDistanceM: 26_840,
  elapsedS: 4200,
  cutBeforeS: 851,
  cutAfterS: 20,
  notes: [],
  sameAs: null,
};

describe("the words of a verdict", () => {
  test("say distance, time, and what was cut off when it was a minute or more", () => {
    expect(verdictWords(read, "km").replaceAll("\u00a0", " ")).toBe(
      "26.84 km on the water in 1 h 10 min. Cut off: 14 min before the time on the water.",
    );
    expect(verdictWords({ ...read, cutAfterS: 200 }, "NM").replaceAll("\u00a0", " ")).toBe(
      "14.49 NM on the water in 1 h 10 min. Cut off: 14 min before and 3 min after the time on the water.",
    );
    expect(verdictWords({ ...read, cutBeforeS: 0 }, "km")).not.toContain("Cut off");
  });

  test("say so when nothing of it was on the water", () => {
    expect(verdictWords({ ...read, elapsedS: 0 }, "km")).toContain("set the ends by hand");
  });

  test("give a refusal its own sentence", () => {
    expect(
      verdictWords({ kind: "refused", entryName: "", code: "empty", text: "The file is empty." }, "km"),
    ).toBe("The file is empty.");
  });
});
