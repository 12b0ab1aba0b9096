/**
 * An error as the log may keep it. A failed query's own message lists its parameters (addresses, hashes of passwords and
 * tokens): only the statement stays. What caused it follows, for that is where the driver says what was wrong.
 */
export function errorFacts(error: unknown): { error: string; stack: string | undefined } {
  if (!(error instanceof Error)) return { error: withoutParameters(String(error)), stack: undefined };
  const causes: string[] = [];
  for (let one: unknown = error; one instanceof Error && causes.length < 5; one = one.cause) {
    causes.push(withoutParameters(`${one.name}: ${one.message}`));
  }
  const stack = error.stack?.split("\n").filter((line) => /^\s+at /.test(line));
  return { error: causes.join(" < "), stack: stack?.join("\n") };
}

/** drizzle-orm writes "Failed query: ...", a line break, "params: ..." to the end. */
function withoutParameters(message: string): string {
  return message.replace(/\nparams: [\s\S]*$/, "");
}

/** Takes the parameters of failed queries out of an error that others will print, and out of what caused it. */
export function scrubParameters(error: unknown): void {
  let depth = 0;
  for (let one: unknown = error; one instanceof Error && depth < 5; one = one.cause, depth += 1) {
    if (!("params" in one) || !one.message.includes("\nparams: ")) continue;
    const message = withoutParameters(one.message);
    one.stack = one.stack?.replace(one.message, message);
    one.message = message;
    one.params = [];
  }
}
