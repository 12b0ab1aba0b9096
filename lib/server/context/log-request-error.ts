import { errorFacts, scrubParameters } from "./error-facts";
import { logEvent } from "./log";

/** Logs an error that broke a page, a route or an action, under the reference that the person at the screen sees. */
export function logRequestError(
  error: unknown,
  request: { path: string; method: string; routePath: string },
): void {
  scrubParameters(error);
  const digest = error instanceof Error && "digest" in error ? error.digest : null;
  logEvent("error", "request_failed", {
    reference: typeof digest === "string" ? digest : null,
    // Without its query: links in mails carry their keys there.
    path: request.path.split("?")[0],
    method: request.method,
    routePath: request.routePath,
    ...errorFacts(error),
  });
}
