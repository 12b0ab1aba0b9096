"use client";

import { Th } from "@/components/ui/table";
import { formatTime } from "@/lib/display/format-time";
import { useLive } from "@/components/ui/use-live";

/** Head of a row: its start, which brushes the row's stretch on the timeline when it is pressed. */
export function RowButton({
  startMs,
  timeZone,
  what,
  onPick,
}: {
  startMs: number;
  timeZone: string;
  /** Names the row: "segment 3". */
  what: string;
  onPick: () => void;
}) {
  const live = useLive();
  const time = formatTime(startMs, timeZone, "seconds");
  return (
    <Th scope="row" className="num whitespace-nowrap">
      {live ? (
        <button
          type="button"
          onClick={onPick}
          className="-my-1 min-h-8 py-1 underline decoration-hairline decoration-2 underline-offset-4 hover:decoration-buoy"
        >
          {time}
          <span className="sr-only">, brush {what} on the timeline</span>
        </button>
      ) : (
        time
      )}
    </Th>
  );
}
