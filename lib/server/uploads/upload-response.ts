import { routeResponse } from "@/lib/server/adapter/route-response";
import { logEvent } from "@/lib/server/context/log";
import { UploadRefusedError } from "@/lib/server/storage/upload-refused-error";

/** Runs an upload route's work; refusals keep their own status, the rest goes the way of every route. */
export async function uploadResponse(work: () => Promise<Response>): Promise<Response> {
  return routeResponse(async () => {
    try {
      return await work();
    } catch (error) {
      if (!(error instanceof UploadRefusedError)) throw error;
      logEvent("info", "upload_refused", { status: error.status, message: error.message });
      return Response.json(
        { type: "about:blank", title: error.message, status: error.status, code: error.code, fields: {} },
        {
          status: error.status,
          headers: { "content-type": "application/problem+json", "cache-control": "no-store" },
        },
      );
    }
  });
}
