"use client";

import { useEffect, useState } from "react";
import type { Stretch } from "@/lib/track/speed-series";

/** Sent on the window by the timeline whenever the brush changes; `detail` is the stretch or null. */
const STRETCH_EVENT = "trimwake:stretch";

const isStretch = (value: unknown): value is Stretch =>
  typeof value === "object" &&
  value !== null &&
  "startMs" in value &&
  "endMs" in value &&
  typeof value.startMs === "number" &&
  typeof value.endMs === "number";

/** The stretch that is brushed on the timeline, or null. */
export function useBrushedStretch(): Stretch | null {
  const [stretch, setStretch] = useState<Stretch | null>(null);
  useEffect(() => {
    const heard = (event: Event) => {
      const detail: unknown = event instanceof CustomEvent ? event.detail : null;
      setStretch(isStretch(detail) ? { startMs: detail.startMs, endMs: detail.endMs } : null);
    };
    window.addEventListener(STRETCH_EVENT, heard);
    return () => window.removeEventListener(STRETCH_EVENT, heard);
  }, []);
  return stretch;
}
