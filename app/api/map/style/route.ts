import { routeResponse } from "@/lib/server/adapter/route-response";
import { basemapStatus } from "@/lib/server/basemap/status";
import { basemapStyle } from "@/lib/server/basemap/style";

export const dynamic = "force-dynamic";

/** The map's background as a MapLibre style: `?theme=light` or `?theme=dark`. */
export async function GET(request: Request): Promise<Response> {
  return routeResponse(async () => {
    const theme = new URL(request.url).searchParams.get("theme") ?? "light";
    const style = basemapStyle(theme, await basemapStatus(Date.now()));
    return Response.json(style, { headers: { "cache-control": "no-cache" } });
  });
}
