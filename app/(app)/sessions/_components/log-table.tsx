import Link from "next/link";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import { compassPoint } from "@/lib/display/format-bearing";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { formatShare } from "@/lib/display/format-quantity";
import { formatSpeed } from "@/lib/display/format-speed";
import { formatDate, formatTime } from "@/lib/display/format-time";
import { logQuery, type LogFilter, type LogSort } from "@/lib/server/log/log-filter";
import type { LogRow } from "@/lib/server/log/list-log";
import { distanceFromM, type DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";

type Units = { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
type Column = {
  readonly sort: LogSort;
  readonly label: string;
  readonly unit?: string;
  readonly show: (row: LogRow) => string;
};

/** Numeric columns in the order they are read: how far, how much on foil, how fast. */
function columns({ speed, distance }: Units): readonly Column[] {
  const length = (metres: number) => formatNumber(distanceFromM(metres, distance), 2);
  return [
    { sort: "elapsed", label: "Elapsed", show: (row) => formatDuration(row.elapsedS) },
    { sort: "distance", label: "Under way", unit: distance, show: (row) => length(row.waterDistanceM) },
    { sort: "onFoilDistance", label: "On foil", unit: distance, show: (row) => length(row.onFoilDistanceM) },
    { sort: "onFoilTime", label: "On foil", show: (row) => formatDuration(row.onFoilTimeS) },
    { sort: "onFoilShare", label: "On foil", unit: "%", show: (row) => formatShare(row.onFoilShare) },
    { sort: "takeoffs", label: "Take-offs", show: (row) => String(row.takeoffs) },
    { sort: "longest", label: "Longest", unit: distance, show: (row) => length(row.longestSegmentM) },
    {
      sort: "bumpSpeed",
      label: "Bump-riding",
      unit: speed,
      show: (row) => formatSpeed(row.bumpRidingSpeedMps, speed),
    },
    { sort: "bumpRides", label: "Bump rides", show: (row) => formatNumber(row.bumpRides, 0) },
    { sort: "glide", label: "Glide ratio", show: (row) => formatNumber(row.glideRatio, 1) },
    { sort: "best2s", label: "Best 2 s", unit: speed, show: (row) => formatSpeed(row.best2sMps, speed) },
    { sort: "best10s", label: "Best 10 s", unit: speed, show: (row) => formatSpeed(row.best10sMps, speed) },
    {
      sort: "best500m",
      label: "Best 500 m",
      unit: speed,
      show: (row) => formatSpeed(row.best500mMps, speed),
    },
    { sort: "bestNm", label: "Best NM", unit: speed, show: (row) => formatSpeed(row.bestNmMps, speed) },
  ];
}

/** The log, a row a session; every figure's head sorts. */
export function LogTable(props: { rows: readonly LogRow[]; filter: LogFilter; units: Units }) {
  const { rows, filter, units } = props;
  const list = columns(units);
  const sorting = (sort: LogSort) => {
    const active = filter.sort === sort;
    const order = active && filter.order === "desc" ? "asc" : "desc";
    return {
      sortHref: `/sessions${logQuery(filter, { sort, order })}`,
      sorted: active
        ? filter.order === "desc"
          ? ("descending" as const)
          : ("ascending" as const)
        : undefined,
    };
  };
  return (
    <Table caption="Sessions, one a row">
      <thead>
        <Tr>
          <Th className="bg-paper sticky left-0 z-10">Session</Th>
          <Th {...sorting("start")}>Start</Th>
          <Th>Setup</Th>
          <Th numeric unit={units.speed} {...sorting("wind")}>
            Wind
          </Th>
          {list.map((column) => (
            <Th key={column.sort} numeric unit={column.unit} {...sorting(column.sort)}>
              {column.label}
            </Th>
          ))}
          <Th>Quality</Th>
        </Tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Tr key={row.id}>
            <Th scope="row" className="bg-paper sticky left-0 z-10 max-w-64 min-w-44">
              <Link className="link" href={`/sessions/${row.id}`}>
                {row.title}
              </Link>
            </Th>
            <Td className="whitespace-nowrap">
              {formatDate(row.startMs, row.timeZone)}{" "}
              <span className="num text-muted">{formatTime(row.startMs, row.timeZone)}</span>
            </Td>
            <Td className="min-w-44">{row.setups.join(", ") || "–"}</Td>
            <Td numeric className="whitespace-nowrap">
              {formatSpeed(row.windSpeedMps, units.speed)}
              {row.windFromDeg !== null && <span className="unit"> {compassPoint(row.windFromDeg)}</span>}
            </Td>
            {list.map((column) => (
              <Td key={column.sort} numeric>
                {column.show(row)}
              </Td>
            ))}
            <Td>{row.qualityGrade}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
