/** What a form gets back from its action; values are returned because React resets the fields after an action. */
export type FormState = {
  readonly status: "idle" | "ok" | "error";
  readonly message: string;
  /** Field name to sentence. */
  readonly fields: Readonly<Record<string, string>>;
  readonly values: Readonly<Record<string, string>>;
};

/** The state before anything was sent. */
export const IDLE_FORM: FormState = { status: "idle", message: "", fields: {}, values: {} };

/**
 * The errors of a refused form for its summary: one per field, or the message alone when it belongs to no field.
 *
 * @example
 * formErrors({ status: "error", message: "No.", fields: {}, values: {} }); // [{ "name": null, "text": "No." }]
 */
export function formErrors(state: FormState): { name: string | null; text: string }[] {
  if (state.status !== "error") return [];
  const fields = Object.entries(state.fields).map(([name, text]) => ({ name, text }));
  return fields.length > 0 ? fields : [{ name: null, text: state.message }];
}
