/**
 * One JSON line per event on standard output: when (UTC), what, and facts about it. JSON encoding keeps a
 * newline in somebody's name from forging a line. Never log tokens, passwords or e-mail addresses.
 */
export function logEvent(
  level: "info" | "warn" | "error",
  event: string,
  facts: Record<string, unknown> = {},
): void {
  const line = JSON.stringify({ at: new Date().toISOString(), level, event, ...facts });
  process.stdout.write(`${line}\n`);
}
