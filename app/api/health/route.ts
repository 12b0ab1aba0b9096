import { health } from "@/lib/server/start/health";

export const dynamic = "force-dynamic";

/** 200 when the database and storage answer, 503 when one does not. */
export async function GET(): Promise<Response> {
  const state = await health();
  return Response.json(state, { status: state.ok ? 200 : 503, headers: { "cache-control": "no-store" } });
}
