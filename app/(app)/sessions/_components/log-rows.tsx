import Link from "next/link";
import type { ReactNode } from "react";
import { Unit } from "@/components/ui/unit";
import { compassPoint } from "@/lib/display/format-bearing";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { formatSpeed, speedWithUnit } from "@/lib/display/format-speed";
import { formatDate, formatTime } from "@/lib/display/format-time";
import type { LogRow } from "@/lib/server/log/list-log";
import { distanceFromM, type DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";

/** The log on a phone: what a rider looks for on the beach, a block a session instead of a wide table. */
export function LogRows(props: {
  rows: readonly LogRow[];
  units: { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
}) {
  const { rows, units } = props;
  return (
    <ul className="rule-ink">
      {rows.map((row) => (
        <li key={row.id} className="rule-hair py-3">
          <Link href={`/sessions/${row.id}`} className="flex flex-col gap-1">
            <span className="font-semibold underline decoration-buoy decoration-2 underline-offset-4">
              {row.title}
            </span>
            <span className="text-muted text-sm">
              {formatDate(row.startMs, row.timeZone)} {formatTime(row.startMs, row.timeZone)}
              {row.windSpeedMps !== null && `, ${speedWithUnit(row.windSpeedMps, units.speed)}`}
              {row.windSpeedMps !== null && row.windFromDeg !== null && ` ${compassPoint(row.windFromDeg)}`}
            </span>
            {row.setups.length > 0 && <span className="text-sm">{row.setups.join(", ")}</span>}
            <span className="grid grid-cols-3 gap-2 pt-1">
              <Figure label="On foil">
                <Unit
                  value={formatNumber(distanceFromM(row.onFoilDistanceM, units.distance), 1)}
                  unit={units.distance}
                />
              </Figure>
              {row.bumpRidingSpeedMps === null ? (
                <Figure label="Time on foil">
                  <span className="num">{formatDuration(row.onFoilTimeS)}</span>
                </Figure>
              ) : (
                <Figure label="Bump-riding">
                  <Unit value={formatSpeed(row.bumpRidingSpeedMps, units.speed)} unit={units.speed} />
                </Figure>
              )}
              <Figure label="Best 10 s">
                <Unit value={formatSpeed(row.best10sMps, units.speed)} unit={units.speed} />
              </Figure>
            </span>
          </Link>
        </li>
      ))}
    </ul>
  );
}

function Figure(props: { label: string; children: ReactNode }) {
  return (
    <span className="flex flex-col">
      <span className="text-muted text-xs">{props.label}</span>
      {props.children}
    </span>
  );
}
