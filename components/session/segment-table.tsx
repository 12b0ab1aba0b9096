"use client";

import { memo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import type { OnFoilSegment } from "@/lib/analysis/analysis";
import type { CsvCell } from "@/lib/display/csv";
import { formatBearing } from "@/lib/display/format-bearing";
import { formatDistance } from "@/lib/display/format-distance";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { formatSpeed } from "@/lib/display/format-speed";
import { dateInputValue, isoWithOffset } from "@/lib/display/format-time";
import { distanceFromM } from "@/lib/units/length";
import { speedFromMps } from "@/lib/units/speed";
import { CsvButton } from "./csv-button";
import { RowButton } from "./row-button";
import { ROWS_AT_ONCE, useRowMark, type StretchTableContext } from "./stretch-rows";

/** How sure the segment is, in words; the steps are ours. */
function sureness(confidence: number): string {
  if (confidence >= 0.95) return "sure";
  if (confidence >= 0.8) return "likely";
  return "doubtful";
}

const rounded = (value: number, decimals: number): number => Number(value.toFixed(decimals));
const secondsOf = (one: { startMs: number; endMs: number }) => (one.endMs - one.startMs) / 1000;

function csvRows(
  segments: readonly OnFoilSegment[],
  { timeZone, speedUnit, distanceUnit }: StretchTableContext,
): CsvCell[][] {
  const head = [
    "Segment",
    "Start",
    "End",
    "Duration, s",
    `Distance, ${distanceUnit}`,
    `Mean speed, ${speedUnit}`,
    `Highest speed, ${speedUnit}`,
    "Bearing, degrees true",
    "Take-off effort, s",
    "Confidence, 0 to 1",
  ];
  const rows = segments.map((one, index) => [
    index + 1,
    isoWithOffset(one.startMs, timeZone),
    isoWithOffset(one.endMs, timeZone),
    rounded(secondsOf(one), 1),
    rounded(distanceFromM(one.distanceM, distanceUnit), 4),
    rounded(speedFromMps(one.speedMpsMean, speedUnit), 2),
    rounded(speedFromMps(one.speedMpsMax, speedUnit), 2),
    rounded(one.bearingDeg, 0),
    rounded(one.takeoffEffortS, 1),
    rounded(one.confidence, 3),
  ]);
  return [head, ...rows];
}

type RowProps = StretchTableContext & { segment: OnFoilSegment; index: number };

const SegmentRow = memo(function SegmentRow(props: RowProps) {
  const { segment, index, timeZone, speedUnit, distanceUnit, cursor, onSelect } = props;
  return (
    <Tr>
      <Td numeric className="text-muted">
        {index + 1}
      </Td>
      <RowButton
        startMs={segment.startMs}
        timeZone={timeZone}
        what={`segment ${index + 1}`}
        onPick={() => {
          onSelect({ startMs: segment.startMs, endMs: segment.endMs });
          cursor.set(segment.startMs);
        }}
      />
      <Td numeric>{formatDuration(secondsOf(segment))}</Td>
      <Td numeric>{formatDistance(segment.distanceM, distanceUnit)}</Td>
      <Td numeric>{formatSpeed(segment.speedMpsMean, speedUnit)}</Td>
      <Td numeric>{formatSpeed(segment.speedMpsMax, speedUnit)}</Td>
      <Td numeric>{formatBearing(segment.bearingDeg)}</Td>
      <Td numeric>{formatNumber(segment.takeoffEffortS, 0)}</Td>
      <Td>{sureness(segment.confidence)}</Td>
    </Tr>
  );
});

/** The on-foil segments of a session; the start of a row brushes it on the timeline. */
export function SegmentTable(props: StretchTableContext & { segments: readonly OnFoilSegment[] }) {
  const { segments, ...context } = props;
  const [shown, setShown] = useState(ROWS_AT_ONCE);
  const body = useRowMark(context.cursor, segments);
  const first = segments[0];
  if (first === undefined) {
    return (
      <p className="rule-ink text-muted py-4">
        The board was never on foil for long enough to be sure of it.
      </p>
    );
  }
  return (
    <>
      <Table caption="On-foil segments, one a row">
        <thead>
          <tr>
            <Th numeric>No.</Th>
            <Th>Take-off</Th>
            <Th numeric>Duration</Th>
            <Th numeric unit={context.distanceUnit}>
              Distance
            </Th>
            <Th numeric unit={context.speedUnit}>
              Mean
            </Th>
            <Th numeric unit={context.speedUnit}>
              Highest
            </Th>
            <Th numeric>Bearing</Th>
            <Th numeric unit="s">
              Effort to take off
            </Th>
            <Th>On foil</Th>
          </tr>
        </thead>
        <tbody ref={body}>
          {segments.slice(0, shown).map((segment, index) => (
            <SegmentRow key={segment.startMs} {...context} segment={segment} index={index} />
          ))}
        </tbody>
      </Table>
      <div className="no-print mt-2 flex flex-wrap gap-2">
        {shown < segments.length && (
          <Button size="small" onClick={() => setShown((count) => count + ROWS_AT_ONCE)}>
            Show more, {segments.length - shown} left
          </Button>
        )}
        <CsvButton
          what="on-foil segments"
          fileName={`on-foil-segments-${dateInputValue(first.startMs, context.timeZone)}.csv`}
          rows={() => csvRows(segments, context)}
        />
      </div>
    </>
  );
}
