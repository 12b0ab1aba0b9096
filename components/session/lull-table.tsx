"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Missing } from "@/components/ui/missing";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import type { Lull } from "@/lib/analysis/analysis";
import { formatNumber } from "@/lib/display/format-number";
import { dateInputValue, isoWithOffset } from "@/lib/display/format-time";
import { CsvButton } from "./csv-button";
import { RowButton } from "./row-button";
import { ROWS_AT_ONCE, type StretchTableContext } from "./stretch-rows";

const secondsOf = (lull: Lull) => (lull.endMs - lull.startMs) / 1000;
/** Way per height lost; null for a lull that lost none. */
const glideOf = (lull: Lull) => (lull.heightLostM > 0 ? lull.distanceM / lull.heightLostM : null);

function csvRows(lulls: readonly Lull[], timeZone: string) {
  const head = ["Start", "Duration, s", "Distance, m", "Energy height lost, m", "Glide", "Kept the foil"];
  const body = lulls.map((lull) => [
    isoWithOffset(lull.startMs, timeZone),
    Number(secondsOf(lull).toFixed(1)),
    Number(lull.distanceM.toFixed(1)),
    Number(lull.heightLostM.toFixed(3)),
    Number((glideOf(lull) ?? 0).toFixed(2)) || "",
    lull.keptFoil ? "yes" : "no",
  ]);
  return [head, ...body];
}

/** The lull fan as a table. */
export function LullTable(props: StretchTableContext & { lulls: readonly Lull[] }) {
  const { lulls, timeZone, cursor, onSelect } = props;
  const [shown, setShown] = useState(ROWS_AT_ONCE);
  const first = lulls[0];
  if (first === undefined) return <p className="rule-ink text-muted py-4">There is no lull in it.</p>;
  return (
    <>
      <Table caption="Lulls, one a row">
        <thead>
          <tr>
            <Th>Start</Th>
            <Th numeric unit="s">
              Duration
            </Th>
            <Th numeric unit="m">
              Distance
            </Th>
            <Th numeric unit="m">
              Height lost
            </Th>
            <Th numeric>Glide</Th>
            <Th>Kept the foil</Th>
          </tr>
        </thead>
        <tbody>
          {lulls.slice(0, shown).map((lull, index) => (
            <Tr key={lull.startMs}>
              <RowButton
                startMs={lull.startMs}
                timeZone={timeZone}
                what={`lull ${index + 1}`}
                onPick={() => {
                  onSelect({ startMs: lull.startMs, endMs: lull.endMs });
                  cursor.set(lull.startMs);
                }}
              />
              <Td numeric>{formatNumber(secondsOf(lull), 1)}</Td>
              <Td numeric>{formatNumber(lull.distanceM, 0)}</Td>
              <Td numeric>{formatNumber(lull.heightLostM, 2)}</Td>
              <Td numeric>
                {glideOf(lull) === null ? (
                  <Missing reason="no height was lost" />
                ) : (
                  formatNumber(glideOf(lull), 1)
                )}
              </Td>
              <Td>{lull.keptFoil ? "yes" : "no"}</Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      <div className="no-print mt-2 flex flex-wrap gap-2">
        {shown < lulls.length && (
          <Button size="small" onClick={() => setShown((count) => count + ROWS_AT_ONCE)}>
            Show more, {lulls.length - shown} left
          </Button>
        )}
        <CsvButton
          what="all lulls"
          fileName={`lulls-${dateInputValue(first.startMs, timeZone)}.csv`}
          rows={() => csvRows(lulls, timeZone)}
        />
      </div>
    </>
  );
}
