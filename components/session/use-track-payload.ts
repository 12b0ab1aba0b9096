"use client";

import { useQuery } from "@tanstack/react-query";
import { decodeTrackPayload, type TrackPayload } from "@/lib/analysis/track-payload";

async function fetchPayload(sessionId: string, signal: AbortSignal): Promise<TrackPayload> {
  const answer = await fetch(`/api/sessions/${sessionId}/track`, { signal });
  if (!answer.ok) {
    throw new Error(
      answer.status === 401
        ? "Your sign-in has ended. Sign in again to see the track."
        : "The track could not be loaded. Check the connection and try again.",
    );
  }
  return decodeTrackPayload(await answer.arrayBuffer());
}

/** The analysed track of a session, fetched once and kept while its revision stays the same. */
export function useTrackPayload(sessionId: string, revision: string) {
  return useQuery({
    queryKey: ["track", sessionId, revision],
    queryFn: ({ signal }) => fetchPayload(sessionId, signal),
    staleTime: Infinity,
    // Columns of a hundred thousand samples are not to be compared value by value.
    structuralSharing: false,
    retry: 1,
  });
}
