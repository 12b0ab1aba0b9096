/** Next calls this once per server process, before the first request. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startUp } = await import("@/lib/server/start/start-up");
  await startUp();
}
