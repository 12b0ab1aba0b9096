import { routeResponse } from "@/lib/server/adapter/route-response";
import { basemapStatus } from "@/lib/server/basemap/status";

export const dynamic = "force-dynamic";

/** Whether the coastline is ready, how far its preparation is, or which other style the operator has set. */
export async function GET(): Promise<Response> {
  return routeResponse(async () =>
    Response.json(await basemapStatus(Date.now()), { headers: { "cache-control": "no-store" } }),
  );
}
