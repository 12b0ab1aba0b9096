import { csvText, type CsvCell } from "@/lib/display/csv";
import { isoWithOffset } from "@/lib/display/format-time";
import type { Context } from "@/lib/server/context/context";
import { distanceFromM, type DistanceUnit } from "@/lib/units/length";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";
import { logRows, type LogRow } from "./list-log";
import type { LogFilter } from "./log-filter";

/** More rows than anybody's log; bounds the memory of one answer. */
const CSV_ROWS_MAX = 20_000;

type Units = { readonly speed: SpeedUnit; readonly distance: DistanceUnit };

const round = (value: number | null, decimals: number): number | null =>
  value === null || !Number.isFinite(value) ? null : Number(value.toFixed(decimals));

function head({ speed, distance }: Units): string[] {
  return [
    "Start",
    "Title",
    "Spot",
    "Discipline",
    "Setups",
    "Quality",
    "Wind from °",
    `Wind ${speed}`,
    "Elapsed s",
    `Distance under way ${distance}`,
    `On foil ${distance}`,
    "On foil s",
    "On-foil share",
    "Take-offs",
    `Longest on-foil segment ${distance}`,
    `Bump-riding speed ${speed}`,
    "Bump rides",
    "Glide ratio",
    `Best 2 s ${speed}`,
    `Best 10 s ${speed}`,
    `Best 500 m ${speed}`,
    `Best nautical mile ${speed}`,
  ];
}

function line(row: LogRow, units: Units): CsvCell[] {
  const speed = (mps: number | null) => (mps === null ? null : round(speedFromMps(mps, units.speed), 2));
  const distance = (metres: number) => round(distanceFromM(metres, units.distance), 3);
  return [
    isoWithOffset(row.startMs, row.timeZone),
    row.title,
    row.spot,
    row.discipline,
    row.setups.join("; "),
    row.qualityGrade,
    round(row.windFromDeg, 0),
    speed(row.windSpeedMps),
    round(row.elapsedS, 0),
    distance(row.waterDistanceM),
    distance(row.onFoilDistanceM),
    round(row.onFoilTimeS, 0),
    round(row.onFoilShare, 3),
    row.takeoffs,
    distance(row.longestSegmentM),
    speed(row.bumpRidingSpeedMps),
    row.bumpRides,
    round(row.glideRatio, 2),
    speed(row.best2sMps),
    speed(row.best10sMps),
    speed(row.best500mMps),
    speed(row.bestNmMps),
  ];
}

/** What the filter leaves of the asker's log as CSV (RFC 4180), in the asker's units, named in every head. */
export async function logCsv(ctx: Context, filter: LogFilter, units: Units): Promise<string> {
  const rows = await logRows(ctx, filter, { limit: CSV_ROWS_MAX, offset: 0 });
  return csvText([head(units), ...rows.map((row) => line(row, units))]);
}
