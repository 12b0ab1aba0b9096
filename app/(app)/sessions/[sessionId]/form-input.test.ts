import { describe, expect, it } from "vitest";
import { AppError } from "@/lib/errors/app-error";
import { gearRows, gearSpansOf, underFormNames } from "./form-input";

const ZONE = "Europe/Copenhagen";
const at = (clock: string) => Date.parse(`2025-06-14T${clock}+02:00`);
const near = at("13:40:00");

function rowsOf(...rows: [string, string, string][]) {
  const form = new Map(
    rows.flatMap(([setupId, from, to], row) => [
      [`gear-setup-${row}`, setupId],
      [`gear-from-${row}`, from],
      [`gear-to-${row}`, to],
    ]),
  );
  return gearRows((name) => form.get(name) ?? "", rows.length);
}

function fieldsOf(work: () => unknown): AppError["fields"] {
  try {
    work();
  } catch (error) {
    if (error instanceof AppError) return error.fields;
  }
  return {};
}

describe("gearSpansOf", () => {
  it("tags the whole session when both ends are left empty", () => {
    expect(gearSpansOf(rowsOf(["a", "", ""]), near, ZONE)).toEqual([
      { setupId: "a", startMs: null, endMs: null },
    ]);
  });

  it("takes one time for a change of gear from either row", () => {
    const changed = [
      { setupId: "a", startMs: null, endMs: at("13:20:00") },
      { setupId: "b", startMs: at("13:20:00"), endMs: null },
    ];
    expect(gearSpansOf(rowsOf(["a", "", ""], ["b", "13:20", ""]), near, ZONE)).toEqual(changed);
    expect(gearSpansOf(rowsOf(["a", "", "13:20"], ["b", "", ""]), near, ZONE)).toEqual(changed);
  });

  it("leaves rows without anything out, so that an empty form takes every tag away", () => {
    expect(gearSpansOf(rowsOf(["", "", ""]), near, ZONE)).toEqual([]);
    expect(rowsOf(["", "", ""], ["b", "", ""]).map((one) => one.row)).toEqual([1]);
  });

  it("says per field what is missing or cannot be read", () => {
    expect(fieldsOf(() => gearSpansOf(rowsOf(["a", "noon", ""], ["", "", "13:50"]), near, ZONE))).toEqual({
      "gear-from-0": "Enter the time as hours and minutes, such as 13:08 or 13:08:30.",
      "gear-setup-1": "Choose a setup, or remove the row.",
      "gear-from-1": "Enter the time the gear was changed.",
    });
  });
});

describe("underFormNames", () => {
  it("moves a field error to the form's own field and words", async () => {
    const work = () =>
      Promise.reject(new AppError("validation", "No.", { fields: { startMs: "Low.", other: "Kept." } }));
    await expect(underFormNames({ startMs: { name: "trimStart" } }, work)).rejects.toMatchObject({
      code: "validation",
      fields: { trimStart: "Low.", other: "Kept." },
    });
    await expect(
      underFormNames({ startMs: { name: "trimStart", text: "Lower." } }, work),
    ).rejects.toMatchObject({ fields: { trimStart: "Lower." } });
  });

  it("leaves any other error as it is", async () => {
    const odd = new Error("disk");
    await expect(underFormNames({}, () => Promise.reject(odd))).rejects.toBe(odd);
  });
});
