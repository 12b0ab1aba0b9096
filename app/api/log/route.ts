import { requestContext } from "@/lib/server/adapter/request-context";
import { routeResponse } from "@/lib/server/adapter/route-response";
import { currentUser } from "@/lib/server/auth/current-user";
import { logCsv } from "@/lib/server/log/log-csv";
import { parseLogFilter } from "@/lib/server/log/log-filter";

/** The filtered log as a CSV file; takes the same search parameters as the page. */
export async function GET(request: Request): Promise<Response> {
  return routeResponse(async () => {
    const ctx = await requestContext();
    const units = (await currentUser())?.units ?? { speed: "kn", distance: "km" };
    const params = Object.fromEntries(new URL(request.url).searchParams);
    const text = await logCsv(ctx, parseLogFilter(params), units);
    return new Response(text, {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": 'attachment; filename="trimwake-sessions.csv"',
        "cache-control": "no-store",
        "x-content-type-options": "nosniff",
      },
    });
  });
}
