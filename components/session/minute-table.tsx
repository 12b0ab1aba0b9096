"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import { formatDistance } from "@/lib/display/format-distance";
import { formatShare } from "@/lib/display/format-quantity";
import { formatSpeed } from "@/lib/display/format-speed";
import { dateInputValue, isoWithOffset } from "@/lib/display/format-time";
import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";
import { distanceFromM } from "@/lib/units/length";
import { speedFromMps } from "@/lib/units/speed";
import { CsvButton } from "./csv-button";
import { minuteRows, type MinuteRow } from "./minute-rows";
import { RowButton } from "./row-button";
import { ROWS_AT_ONCE, type StretchTableContext } from "./stretch-rows";

function csvRows(rows: readonly MinuteRow[], context: StretchTableContext) {
  const { timeZone, speedUnit, distanceUnit } = context;
  const speed = (mps: number | null) => (mps === null ? "" : Number(speedFromMps(mps, speedUnit).toFixed(2)));
  const head = [
    "Start",
    `Distance, ${distanceUnit}`,
    `Mean speed, ${speedUnit}`,
    `Highest speed, ${speedUnit}`,
    "On foil, %",
  ];
  const body = rows.map((row) => [
    isoWithOffset(row.startMs, timeZone),
    Number(distanceFromM(row.distanceM, distanceUnit).toFixed(4)),
    speed(row.speedMpsMean),
    speed(row.speedMpsMax),
    row.onFoilShare === null ? "" : Math.round(row.onFoilShare * 100),
  ]);
  return [head, ...body];
}

/** The timeline as a table: speed minute by minute. */
export function MinuteTable(props: StretchTableContext & { series: SpeedSeries; stretch: Stretch }) {
  const { series, stretch, ...context } = props;
  const { timeZone, speedUnit, distanceUnit, cursor, onSelect } = context;
  const rows = useMemo(() => minuteRows(series, stretch), [series, stretch]);
  const [shown, setShown] = useState(ROWS_AT_ONCE);
  return (
    <>
      <Table caption="Speed minute by minute">
        <thead>
          <tr>
            <Th>Start</Th>
            <Th numeric unit={distanceUnit}>
              Distance
            </Th>
            <Th numeric unit={speedUnit}>
              Mean
            </Th>
            <Th numeric unit={speedUnit}>
              Highest
            </Th>
            <Th numeric unit="%">
              On foil
            </Th>
          </tr>
        </thead>
        <tbody>
          {rows.slice(0, shown).map((row, index) => (
            <Tr key={row.startMs}>
              <RowButton
                startMs={row.startMs}
                timeZone={timeZone}
                what={`minute ${index + 1}`}
                onPick={() => {
                  onSelect({ startMs: row.startMs, endMs: row.endMs });
                  cursor.set(row.startMs);
                }}
              />
              <Td numeric>{formatDistance(row.distanceM, distanceUnit)}</Td>
              <Td numeric>{formatSpeed(row.speedMpsMean, speedUnit)}</Td>
              <Td numeric>{formatSpeed(row.speedMpsMax, speedUnit)}</Td>
              <Td numeric>{formatShare(row.onFoilShare)}</Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      <div className="no-print mt-2 flex flex-wrap gap-2">
        {shown < rows.length && (
          <Button size="small" onClick={() => setShown((count) => count + ROWS_AT_ONCE)}>
            Show more, {rows.length - shown} left
          </Button>
        )}
        <CsvButton
          what="speed minute by minute"
          fileName={`minutes-${dateInputValue(stretch.startMs, timeZone)}.csv`}
          rows={() => csvRows(rows, context)}
        />
      </div>
    </>
  );
}
