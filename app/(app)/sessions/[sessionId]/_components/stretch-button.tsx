"use client";

import { Button } from "@/components/ui/button";
import { useLive } from "@/components/ui/use-live";
import { formatTime } from "@/lib/display/format-time";
import type { Stretch } from "@/lib/track/speed-series";

export type Ends = { readonly from: string; readonly to: string };

/** Puts the ends of the stretch that is brushed on the timeline into a form. */
export function StretchButton({
  stretch,
  timeZone,
  what,
  onUse,
}: {
  stretch: Stretch | null;
  timeZone: string;
  /** Tells apart several of them on one page, for the accessible name: "for setup 2". */
  what: string;
  onUse: (ends: Ends) => void;
}) {
  const live = useLive();
  if (!live) return null;
  const clock = (timeMs: number) => formatTime(timeMs, timeZone, "seconds");
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
      <Button
        size="small"
        disabled={stretch === null}
        onClick={() => {
          if (stretch !== null) onUse({ from: clock(stretch.startMs), to: clock(stretch.endMs) });
        }}
      >
        Use the brushed stretch<span className="sr-only"> {what}</span>
      </Button>
      <span className="text-muted text-sm">
        {stretch === null ? (
          "Nothing is brushed on the timeline."
        ) : (
          <span className="num">
            {clock(stretch.startMs)}–{clock(stretch.endMs)}
          </span>
        )}
      </span>
    </div>
  );
}
