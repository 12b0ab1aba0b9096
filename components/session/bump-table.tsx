"use client";

import { memo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import type { BumpRide } from "@/lib/analysis/analysis";
import type { CsvCell } from "@/lib/display/csv";
import { formatNumber } from "@/lib/display/format-number";
import { formatSpeed, formatSpeedChange } from "@/lib/display/format-speed";
import { dateInputValue, isoWithOffset } from "@/lib/display/format-time";
import { speedFromMps } from "@/lib/units/speed";
import { CsvButton } from "./csv-button";
import { RowButton } from "./row-button";
import { ROWS_AT_ONCE, useRowMark, type StretchTableContext } from "./stretch-rows";

const rounded = (value: number, decimals: number): number => Number(value.toFixed(decimals));
const secondsOf = (one: { startMs: number; endMs: number }) => (one.endMs - one.startMs) / 1000;

function csvRows(rides: readonly BumpRide[], { timeZone, speedUnit }: StretchTableContext): CsvCell[][] {
  const head = [
    "Bump ride",
    "Start",
    "Duration, s",
    "Peak",
    `Peak speed, ${speedUnit}`,
    `Gain, ${speedUnit}`,
    "Distance, m",
  ];
  const rows = rides.map((ride, index) => [
    index + 1,
    isoWithOffset(ride.startMs, timeZone),
    rounded(secondsOf(ride), 1),
    isoWithOffset(ride.peakMs, timeZone),
    rounded(speedFromMps(ride.speedMpsPeak, speedUnit), 2),
    rounded(speedFromMps(ride.gainMps, speedUnit), 2),
    rounded(ride.distanceM, 1),
  ]);
  return [head, ...rows];
}

type RowProps = StretchTableContext & { ride: BumpRide; index: number };

const BumpRow = memo(function BumpRow(props: RowProps) {
  const { ride, index, timeZone, speedUnit, cursor, onSelect } = props;
  return (
    <Tr>
      <Td numeric className="text-muted">
        {index + 1}
      </Td>
      <RowButton
        startMs={ride.startMs}
        timeZone={timeZone}
        what={`bump ride ${index + 1}`}
        onPick={() => {
          onSelect({ startMs: ride.startMs, endMs: ride.endMs });
          cursor.set(ride.startMs);
        }}
      />
      <Td numeric>{formatNumber(secondsOf(ride), 1)}</Td>
      <Td numeric>{formatSpeed(ride.speedMpsPeak, speedUnit)}</Td>
      <Td numeric>{formatSpeedChange(ride.gainMps, speedUnit)}</Td>
      <Td numeric>{formatNumber(ride.distanceM, 0)}</Td>
    </Tr>
  );
});

/** The bump rides of a session; the start of a row brushes it on the timeline. Rides are short: distances stay in metres. */
export function BumpTable(props: StretchTableContext & { bumpRides: readonly BumpRide[] }) {
  const { bumpRides, ...context } = props;
  const [shown, setShown] = useState(ROWS_AT_ONCE);
  const body = useRowMark(context.cursor, bumpRides);
  const first = bumpRides[0];
  if (first === undefined) {
    return (
      <p className="rule-ink text-muted py-4">
        No bump ride stood out: the speed on foil rose and fell less than the measurement can tell.
      </p>
    );
  }
  return (
    <>
      <Table caption="Bump rides, one a row">
        <thead>
          <tr>
            <Th numeric>No.</Th>
            <Th>Start</Th>
            <Th numeric unit="s">
              Duration
            </Th>
            <Th numeric unit={context.speedUnit}>
              Peak speed
            </Th>
            <Th numeric unit={context.speedUnit}>
              Gain
            </Th>
            <Th numeric unit="m">
              Distance
            </Th>
          </tr>
        </thead>
        <tbody ref={body}>
          {bumpRides.slice(0, shown).map((ride, index) => (
            <BumpRow key={ride.startMs} {...context} ride={ride} index={index} />
          ))}
        </tbody>
      </Table>
      <div className="no-print mt-2 flex flex-wrap gap-2">
        {shown < bumpRides.length && (
          <Button size="small" onClick={() => setShown((count) => count + ROWS_AT_ONCE)}>
            Show more, {bumpRides.length - shown} left
          </Button>
        )}
        <CsvButton
          what="all bump rides"
          fileName={`bump-rides-${dateInputValue(first.startMs, context.timeZone)}.csv`}
          rows={() => csvRows(bumpRides, context)}
        />
      </div>
    </>
  );
}
