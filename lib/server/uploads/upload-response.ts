import { randomBytes } from "node:crypto";
import { routeResponse } from "@/lib/server/adapter/route-response";
import { securityHeaders } from "@/lib/server/adapter/security-headers";
import { logEvent } from "@/lib/server/context/log";
import { env } from "@/lib/server/env/env";
import { UploadRefusedError } from "@/lib/server/storage/upload-refused-error";

/**
 * Runs an upload route's work; refusals keep their own status, the rest goes the way of every route. The headers that the proxy
 * gives to all other answers are set here: uploads do not pass it.
 */
export async function uploadResponse(work: () => Promise<Response>): Promise<Response> {
  const response = await routeResponse(() => refusalsAnswered(work));
  const { mode, origin } = env();
  const headers = securityHeaders({
    nonce: randomBytes(16).toString("base64"),
    isDevelopment: mode === "development",
    isHttps: origin.startsWith("https:"),
    mapStyleUrl: null,
  });
  for (const [name, value] of Object.entries(headers)) response.headers.set(name, value);
  return response;
}

async function refusalsAnswered(work: () => Promise<Response>): Promise<Response> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof UploadRefusedError)) throw error;
    const { message, status, code } = error;
    logEvent("info", "upload_refused", { status, message });
    return Response.json(
      { type: "about:blank", title: message, status, code, fields: {} },
      { status, headers: { "content-type": "application/problem+json", "cache-control": "no-store" } },
    );
  }
}
