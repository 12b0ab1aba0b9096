import { AppError } from "@/lib/errors/app-error";
import { parseLocalTime } from "@/lib/display/parse-local-time";

export const PROBLEM = "There is a problem with what was entered.";
export const CLOCK_HINT = "Enter the time as hours and minutes, such as 13:08 or 13:08:30.";

/** Where a verb's field is shown on the form: under which name, and in which words when its own do not fit. */
export type Renamed = { readonly name: string; readonly text?: string };

/** Runs a verb and gives its field errors the names, and where needed the words, of the form. */
export async function underFormNames<T>(
  names: Readonly<Record<string, Renamed>>,
  work: () => Promise<T>,
): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    const fields = Object.entries(error.fields).map(([field, text]) => {
      const renamed = names[field];
      return [renamed?.name ?? field, renamed?.text ?? text];
    });
    throw new AppError(error.code, error.message, { cause: error, fields: Object.fromEntries(fields) });
  }
}

/** Throws when any field has an error. */
export function refuse(fields: Readonly<Record<string, string>>): void {
  if (Object.keys(fields).length > 0) throw new AppError("validation", PROBLEM, { fields });
}

export type GearRowText = { readonly setupId: string; readonly from: string; readonly to: string };
export type GearRowInput = { setupId: string; startMs: number | null; endMs: number | null };

/** The rows of the gear form as typed, without those left empty, each with its number on the form. */
export function gearRows(text: (name: string) => string, count: number): (GearRowText & { row: number })[] {
  return Array.from({ length: count }, (_, row) => ({
    row,
    setupId: text(`gear-setup-${row}`),
    from: text(`gear-from-${row}`),
    to: text(`gear-to-${row}`),
  })).filter((one) => one.setupId !== "" || one.from !== "" || one.to !== "");
}

/**
 * Gear rows as spans. An end left empty is where the row before or after changes; at the first and last row it is the
 * session's own (null). Times lie nearest to `nearMs`.
 */
export function gearSpansOf(
  rows: readonly (GearRowText & { row: number })[],
  nearMs: number,
  zone: string,
): GearRowInput[] {
  const fields: Record<string, string> = {};
  const read = (name: string, text: string): number | null => {
    const timeMs = text === "" ? null : parseLocalTime(text, nearMs, zone);
    if (text !== "" && timeMs === null) fields[name] = CLOCK_HINT;
    return timeMs;
  };
  const spans = rows.map(({ row, setupId, from, to }) => {
    if (setupId === "") fields[`gear-setup-${row}`] = "Choose a setup, or remove the row.";
    return { setupId, startMs: read(`gear-from-${row}`, from), endMs: read(`gear-to-${row}`, to) };
  });
  for (const [index, span] of spans.entries()) {
    const next = spans[index + 1];
    const nextRow = rows[index + 1]?.row;
    if (next === undefined || nextRow === undefined) continue;
    if (span.endMs === null && next.startMs === null) {
      fields[`gear-from-${nextRow}`] ??= "Enter the time the gear was changed.";
    }
    span.endMs ??= next.startMs;
    next.startMs ??= span.endMs;
  }
  refuse(fields);
  return spans;
}
