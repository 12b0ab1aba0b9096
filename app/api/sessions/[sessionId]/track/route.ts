import { requestContext } from "@/lib/server/adapter/request-context";
import { routeResponse } from "@/lib/server/adapter/route-response";
import { getTrackPayload } from "@/lib/server/sessions/get-track-payload";

export const dynamic = "force-dynamic";

type Params = { params: Promise<{ sessionId: string }> };

/** The analysed track of a session, for the page that draws it. */
export async function GET(request: Request, { params }: Params): Promise<Response> {
  return routeResponse(async () => {
    const { sessionId } = await params;
    const { bytes, etag } = await getTrackPayload(await requestContext(), sessionId);
    const headers = { etag, "cache-control": "private, no-cache", vary: "Cookie" };
    if (request.headers.get("if-none-match") === etag) return new Response(null, { status: 304, headers });
    return new Response(bytes, {
      headers: {
        ...headers,
        "content-type": "application/octet-stream",
        "x-content-type-options": "nosniff",
      },
    });
  });
}
