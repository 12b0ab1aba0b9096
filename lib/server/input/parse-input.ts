import type { z } from "zod";
import { AppError } from "@/lib/errors/app-error";

/**
 * Parses a verb's input.
 *
 * @throws AppError `validation` with one sentence per field, named by its last path element.
 */
export function parseInput<T>(schema: z.ZodType<T>, input: unknown): T {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) {
    const name = String(issue.path.at(-1) ?? "form");
    fields[name] ??= issue.code === "unrecognized_keys" ? "This field is not known here." : issue.message;
  }
  throw new AppError("validation", "There is a problem with what was entered.", { fields });
}
