import { useEffect, useState } from "react";
import { z } from "zod";

const statusSchema = z.discriminatedUnion("state", [
  z.object({ state: z.literal("ready"), stamp: z.string() }),
  z.object({ state: z.literal("preparing"), share: z.number() }),
  z.object({ state: z.literal("missing") }),
  z.object({ state: z.literal("external"), styleUrl: z.string() }),
]);

/** What the map has for a background; asking: not known yet; unreachable: the server did not answer. */
export type Basemap = z.infer<typeof statusSchema> | { state: "asking" } | { state: "unreachable" };

const ASK_AGAIN_MS = 4000;

/** Asks the server for the map's background, and again while the coastline is being prepared. */
export function useBasemap(): Basemap {
  const [basemap, setBasemap] = useState<Basemap>({ state: "asking" });
  useEffect(() => {
    const ended = new AbortController();
    let timer: ReturnType<typeof setTimeout> | undefined;
    const ask = async () => {
      const answer = await readStatus(ended.signal);
      if (ended.signal.aborted) return;
      setBasemap(answer);
      if (answer.state === "preparing" || answer.state === "unreachable")
        timer = setTimeout(ask, ASK_AGAIN_MS);
    };
    void ask();
    return () => {
      ended.abort();
      clearTimeout(timer);
    };
  }, []);
  return basemap;
}

async function readStatus(signal: AbortSignal): Promise<Basemap> {
  try {
    const response = await fetch("/api/map/status", { signal });
    const parsed = statusSchema.safeParse(await response.json());
    return parsed.success ? parsed.data : { state: "unreachable" };
  } catch {
    return { state: "unreachable" };
  }
}
