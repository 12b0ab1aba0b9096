import { AppError, type AppErrorCode } from "@/lib/errors/app-error";
import { env } from "@/lib/server/env/env";
import { describeError } from "./form-state";
import { logDenial } from "./log-denial";
import { isSameOrigin } from "./same-origin";

const STATUS: Readonly<Record<AppErrorCode, number>> = {
  unauthenticated: 401,
  forbidden: 404,
  not_found: 404,
  conflict: 409,
  validation: 422,
  limit_exceeded: 413,
  precondition: 412,
  internal: 500,
};

/** Refuses a state-changing request that another site sent: route handlers have no check of their own. */
export function requireSameOrigin(request: Request): void {
  if (!isSameOrigin(request.headers, env().trustedProxyHops > 0)) {
    throw new AppError("forbidden", "This request did not come from Trimwake's own pages.");
  }
}

/** Runs a route's work; errors become problem details (RFC 9457) with `no-store`. */
export async function routeResponse(work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    if (error instanceof AppError && error.code === "unauthenticated") await logDenial(error);
    const { code, message, fields } = await describeError(error);
    const status = STATUS[code];
    return Response.json(
      { type: "about:blank", title: message, status, code, fields },
      { status, headers: { "content-type": "application/problem+json", "cache-control": "no-store" } },
    );
  }
}
