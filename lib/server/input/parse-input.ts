import type { z } from "zod";
import { AppError } from "@/lib/errors/app-error";

const PROBLEM = "There is a problem with what was entered.";

/**
 * Parses a verb's input.
 *
 * @throws AppError `validation` with one sentence per field, named by its last path element.
 */
export function parseInput<T>(schema: z.ZodType<T>, input: unknown): T {
  const cut = fieldWithNul(input, "form");
  if (cut !== null) {
    const text = "This text holds a character that cannot be kept (NUL). Type it again.";
    throw new AppError("validation", PROBLEM, { fields: { [cut]: text } });
  }
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) {
    const name = String(issue.path.at(-1) ?? "form");
    fields[name] ??= issue.code === "unrecognized_keys" ? "This field is not known here." : issue.message;
  }
  throw new AppError("validation", PROBLEM, { fields });
}

/** No verb's input is nested deeper; what is fails in its schema. */
const DEPTH_MAX = 5;

/** The database driver ends a text at a NUL: what follows would be lost without a word. The field that has one, or null. */
function fieldWithNul(value: unknown, name: string, depth = 0): string | null {
  if (typeof value === "string") return value.includes("\u0000") ? name : null;
  if (typeof value !== "object" || value === null || depth > DEPTH_MAX) return null;
  for (const [key, inner] of Object.entries(value)) {
    const found = fieldWithNul(inner, Array.isArray(value) ? name : key, depth + 1);
    if (found !== null) return found;
  }
  return null;
}
