/** A form's text field as typed; a missing one, or a file where text belongs, counts as empty. */
export function formText(form: FormData, name: string): string {
  const value = form.get(name);
  return typeof value === "string" ? value : "";
}
