import { requestContext } from "@/lib/server/adapter/request-context";
import { routeResponse } from "@/lib/server/adapter/route-response";
import { contentDisposition, getRawFile } from "@/lib/server/sessions/get-raw-file";

export const dynamic = "force-dynamic";

type Params = { params: Promise<{ sessionId: string }> };

/** The uploaded file itself; always saved, never shown in the browser. */
export async function GET(_request: Request, { params }: Params): Promise<Response> {
  return routeResponse(async () => {
    const { sessionId } = await params;
    const { stream, sizeBytes, fileName } = await getRawFile(await requestContext(), sessionId);
    return new Response(stream, {
      headers: {
        "content-type": "application/octet-stream",
        "content-disposition": contentDisposition(fileName),
        "content-length": String(sizeBytes),
        "cache-control": "private, no-store",
        "x-content-type-options": "nosniff",
      },
    });
  });
}
