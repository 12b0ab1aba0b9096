import { routeResponse } from "@/lib/server/adapter/route-response";
import { readLandTile } from "@/lib/server/basemap/read-tile";
import { tileResponse } from "@/lib/server/basemap/tile-response";

export const dynamic = "force-dynamic";

type Params = { params: Promise<{ stamp: string; z: string; x: string; y: string }> };

/** One vector tile of land; 204 for open sea. */
export async function GET(request: Request, { params }: Params): Promise<Response> {
  return routeResponse(async () => tileResponse(request, await readLandTile(await params)));
}
