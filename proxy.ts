import { randomBytes } from "node:crypto";
import { NextResponse, type NextRequest } from "next/server";
import { contentSecurityPolicy, securityHeaders } from "@/lib/server/adapter/security-headers";
import { isSameOrigin } from "@/lib/server/adapter/same-origin";
import { SESSION_COOKIE } from "@/lib/server/auth/session-cookie-name";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";

const READING = new Set(["GET", "HEAD", "OPTIONS"]);

/**
 * Gives every page its headers and a fresh nonce. It decides nothing about who may see what: that is the work of
 * the verbs. Next reads the nonce for its own scripts from the request's policy.
 */
export function proxy(request: NextRequest): NextResponse {
  const { mode, origin, mapStyleUrl, trustedProxyHops } = env();
  const settings = {
    nonce: randomBytes(16).toString("base64"),
    isDevelopment: mode === "development",
    isHttps: origin.startsWith("https:"),
    mapStyleUrl,
  };
  // Forms post to the address of their page: what another site sends there never reaches an action.
  if (!READING.has(request.method) && !isSameOrigin(request.headers, trustedProxyHops > 0)) {
    logEvent("warn", "denied", {
      code: "cross_site",
      method: request.method,
      path: request.nextUrl.pathname,
    });
    const headers = {
      ...securityHeaders(settings),
      "cache-control": "no-store",
      "content-type": "text/plain",
    };
    return new NextResponse("This request did not come from Trimwake's own pages.\n", {
      status: 403,
      headers,
    });
  }
  const inward = new Headers(request.headers);
  inward.set("x-nonce", settings.nonce);
  // Where the person wanted to go, for the way back after signing in.
  inward.set("x-path", request.nextUrl.pathname + request.nextUrl.search);
  inward.set("content-security-policy", contentSecurityPolicy(settings));
  const response = NextResponse.next({ request: { headers: inward } });
  for (const [name, value] of Object.entries(securityHeaders(settings))) response.headers.set(name, value);
  // Routes under /api say themselves what may be kept; pages of a person never may.
  const isPage = !request.nextUrl.pathname.startsWith("/api/");
  if (isPage && request.cookies.has(SESSION_COOKIE)) response.headers.set("cache-control", "no-store");
  return response;
}

export const config = {
  // Not the upload route: what passes here is cut at 10 MB. Not built files: they are the same for everybody, and
  // next.config.mjs gives them their headers. Whole paths, so that no page's address begins like one of them.
  matcher: ["/((?!_next/static/|_next/image$|api/uploads$|favicon\\.ico$|icon\\.svg$).*)"],
};
