import { describe, expect, it } from "vitest";
import { evenWholeSeconds } from "./even-whole-seconds";

function draftAt(seconds: readonly number[]) {
  return {
    count: seconds.length,
    timeMs: Float64Array.from(seconds, (s) => 1.7e12 + 1000 * s),
    latDeg: Float64Array.from(seconds, (_, i) => 57 + i * 5e-5),
    lonDeg: new Float64Array(seconds.length).fill(9),
    source: Uint32Array.from(seconds, (_, i) => i),
  };
}

const secondsOf = (draft: { readonly timeMs: Float64Array }) =>
  Array.from(draft.timeMs, (ms) => (ms - 1.7e12) / 1000);

describe("evenWholeSeconds", () => {
  const start = [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11];

  it("moves what lies between a second written twice and one left out, whichever comes first", () => {
    expect(secondsOf(evenWholeSeconds(draftAt([...start, 12, 12, 13, 15, 16])))).toEqual([
      ...[...start, 12],
      ...[13, 14, 15, 16],
    ]);
    expect(secondsOf(evenWholeSeconds(draftAt([...start, 13, 14, 14, 15, 16])))).toEqual([
      ...[...start, 12],
      ...[13, 14, 15, 16],
    ]);
  });

  it("leaves alone what has parts of seconds, other steps, a lone hole or a lone double", () => {
    for (const seconds of [
      [...start, 12.5, 12.5, 14],
      [0, 4, 8, 8, 13, 17, 21],
      [...start, 13, 14, 15],
      [...start, 11, 12, 13],
      [...start, 15, 15, 16],
    ])
      expect(secondsOf(evenWholeSeconds(draftAt(seconds)))).toEqual(seconds);
  });
});
