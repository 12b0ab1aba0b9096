"use client";

import { useSyncExternalStore } from "react";
import { formatDateTime, isoWithOffset } from "@/lib/display/format-time";

const never = () => () => undefined;
const deviceZone = () => Intl.DateTimeFormat().resolvedOptions().timeZone;

/** An instant by the clock of the device one looks at it on; in UTC, and saying so, until scripts run. */
export function LocalTime({ timeMs }: { timeMs: number }) {
  const zone = useSyncExternalStore(never, deviceZone, () => null);
  return (
    <time dateTime={isoWithOffset(timeMs, "UTC")} className="whitespace-nowrap">
      {zone === null ? `${formatDateTime(timeMs, "UTC")} UTC` : formatDateTime(timeMs, zone)}
    </time>
  );
}
