import type { Instrumentation } from "next";

/** Next calls this once per server process, before the first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startUp } = await import("@/lib/server/start/start-up");
  await startUp();
}

/**
 * Next calls this for every error that reaches no handler of ours. The page shows its digest as the reference: this is
 * where it can be found again.
 */
export const onRequestError: Instrumentation.onRequestError = async (error, request, context) => {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { logRequestError } = await import("@/lib/server/context/log-request-error");
  logRequestError(error, { path: request.path, method: request.method, routePath: context.routePath });
};
