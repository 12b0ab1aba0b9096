import { AppError, type AppErrorCode } from "@/lib/errors/app-error";
import { describeError } from "./form-state";

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
  const site = request.headers.get("sec-fetch-site");
  if (site === "same-origin") return;
  const origin = request.headers.get("origin");
  const host = request.headers.get("x-forwarded-host") ?? request.headers.get("host");
  if (
    site === null &&
    origin !== null &&
    host !== null &&
    URL.canParse(origin) &&
    new URL(origin).host === host
  )
    return;
  throw new AppError("forbidden", "This request did not come from Trimwake's own pages.");
}

/** Runs a route's work; errors become problem details (RFC 9457) with `no-store`. */
export async function routeResponse(work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    const { code, message, fields } = describeError(error);
    const status = STATUS[code];
    return Response.json(
      { type: "about:blank", title: message, status, code, fields },
      { status, headers: { "content-type": "application/problem+json", "cache-control": "no-store" } },
    );
  }
}
