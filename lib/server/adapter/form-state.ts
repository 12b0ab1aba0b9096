import { unstable_rethrow } from "next/navigation";
import { newId } from "@/db/new-id";
import { AppError, type FieldErrors } from "@/lib/errors/app-error";
import type { FormState } from "@/lib/display/form-state";
import { errorFacts } from "@/lib/server/context/error-facts";
import { logEvent } from "@/lib/server/context/log";
import { logDenial } from "./log-denial";

const SECRET_FIELD = /password|token/i;

/** The text fields of a form to give back, without passwords and files. */
export function formValues(form: FormData): Record<string, string> {
  const values: Record<string, string> = {};
  for (const [name, value] of form.entries()) {
    if (typeof value === "string" && !SECRET_FIELD.test(name) && !name.startsWith("$")) values[name] = value;
  }
  return values;
}

/** An error as the person may see it: known ones in their own words, unknown ones by a reference id only. */
export async function describeError(error: unknown): Promise<{
  code: AppError["code"];
  message: string;
  fields: FieldErrors;
}> {
  if (error instanceof AppError) {
    if (error.code === "forbidden" || error.code === "not_found") await logDenial(error);
    return { code: error.code, message: error.message, fields: error.fields };
  }
  const reference = newId();
  const isFull = isDiskFull(error);
  logEvent("error", "unexpected", { reference, ...errorFacts(error) });
  const what = isFull ? "There is no room left on this server's disk." : "Something went wrong on our side.";
  return { code: "internal", message: `${what} Nothing was changed. Reference ${reference}.`, fields: {} };
}

/** Whether an error, or what caused it, is a full disk or a database that may not grow. */
function isDiskFull(error: unknown): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause) {
    if ("code" in cause && (cause.code === "SQLITE_FULL" || cause.code === "ENOSPC")) return true;
  }
  return false;
}

const NOT_A_FORM = "The form did not arrive whole. Load the page again and send it once more.";

/**
 * Runs an action's work and turns what it throws into a form state; redirects pass through. What an action is given is
 * whatever somebody posted to its address: only a form is let through to it.
 */
export async function formAction(form: unknown, work: () => Promise<string>): Promise<FormState> {
  if (!(form instanceof FormData)) return { status: "error", message: NOT_A_FORM, fields: {}, values: {} };
  try {
    return { status: "ok", message: await work(), fields: {}, values: {} };
  } catch (error) {
    unstable_rethrow(error);
    const { message, fields } = await describeError(error);
    return { status: "error", message, fields, values: formValues(form) };
  }
}
