import { describe, expect, it } from "vitest";
import { createTimeCursor } from "./time-cursor";

describe("createTimeCursor", () => {
  it("tells every listener once about a change and nobody about a repeated value", () => {
    const cursor = createTimeCursor();
    const first: (number | null)[] = [];
    const second: (number | null)[] = [];
    cursor.subscribe((timeMs) => first.push(timeMs));
    cursor.subscribe((timeMs) => second.push(timeMs));
    cursor.set(1000);
    cursor.set(1000);
    cursor.set(null);
    expect(first).toEqual([1000, null]);
    expect(second).toEqual([1000, null]);
    expect(cursor.get()).toBeNull();
  });

  it("stops telling a listener that ended its subscription, also while it is being told", () => {
    const cursor = createTimeCursor(5);
    const seen: (number | null)[] = [];
    const end = cursor.subscribe((timeMs) => {
      seen.push(timeMs);
      end();
    });
    cursor.subscribe((timeMs) => seen.push(timeMs));
    cursor.set(6);
    cursor.set(7);
    expect(seen).toEqual([6, 6, 7]);
  });

  it("keeps two subscriptions of one function apart", () => {
    const cursor = createTimeCursor();
    let calls = 0;
    const listener = () => {
      calls += 1;
    };
    const end = cursor.subscribe(listener);
    cursor.subscribe(listener);
    end();
    cursor.set(1);
    expect(calls).toBe(1);
  });

  it("treats a moment that is not a finite number as pointing at nothing", () => {
    const cursor = createTimeCursor(Number.NaN);
    expect(cursor.get()).toBeNull();
    cursor.set(1);
    cursor.set(Number.POSITIVE_INFINITY);
    expect(cursor.get()).toBeNull();
  });
});
