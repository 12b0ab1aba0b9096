"use client";

import { useMemo } from "react";
import type { FieldErrors } from "@/lib/errors/app-error";
import { ErrorSummary } from "./error-summary";
import { Notice } from "./notice";

export type FormOutcome = {
  readonly status: "idle" | "ok" | "error";
  readonly message: string;
  readonly fields: FieldErrors;
};

/** What came of a form: every problem with the way to its field, or what was done. `title` is the page's own. */
export function FormProblems({ state, title }: { state: FormOutcome; title?: string }) {
  const { fields, message } = state;
  // One identity per answer of the server: the summary takes the focus once for each, not at every key stroke.
  const problems = useMemo(() => {
    const named = Object.entries(fields).map(([name, text]) => ({ name, text }));
    return named.length > 0 ? named : [{ name: null, text: message }];
  }, [fields, message]);
  if (state.status === "ok") return message === "" ? null : <Notice kind="done">{message}</Notice>;
  if (state.status === "idle") return null;
  return (
    <>
      {title && <title>{`Error: ${title} - Trimwake`}</title>}
      <ErrorSummary errors={problems} />
    </>
  );
}
