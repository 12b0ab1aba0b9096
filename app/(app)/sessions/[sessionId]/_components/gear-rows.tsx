"use client";

import { useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { SelectField, TextField } from "@/components/ui/fields";
import { FieldSet } from "@/components/ui/field-set";
import { fieldId } from "@/components/ui/field";
import { useLive } from "@/components/ui/use-live";
import type { Stretch } from "@/lib/track/speed-series";
import { StretchButton } from "./stretch-button";

export type SetupOption = { readonly value: string; readonly label: string };
type Row = {
  readonly id: number;
  readonly setupId: string;
  readonly from: string;
  readonly to: string;
  /** Counts the times the ends were filled from the brush, which draws their boxes anew. */
  readonly filled: number;
};

const ROWS_MAX = 20;

function rowsOf(values: Readonly<Record<string, string>>): Row[] {
  const count = Math.min(Math.max(1, Number.parseInt(values["gearRows"] ?? "1", 10) || 1), ROWS_MAX);
  return Array.from({ length: count }, (_, id) => ({
    id,
    setupId: values[`gear-setup-${id}`] ?? "",
    from: values[`gear-from-${id}`] ?? "",
    to: values[`gear-to-${id}`] ?? "",
    filled: 0,
  }));
}

/** One row per setup ridden. A single one without times is the whole session; times appear when there is more to say. */
export function GearRows(props: {
  stretch: Stretch | null;
  values: Readonly<Record<string, string>>;
  errorOf: (name: string) => string | undefined;
  setups: readonly SetupOption[];
  timeZone: string;
}) {
  const { stretch, values, errorOf, setups, timeZone } = props;
  const live = useLive();
  const [rows, setRows] = useState(() => rowsOf(values));
  const [isPart, setPart] = useState(false);
  const nextId = useRef(ROWS_MAX);
  const [first] = rows;
  const isWhole = live && !isPart && rows.length === 1 && first?.from === "" && first.to === "";
  // Without JavaScript there is no "Add": an empty row stands ready, and left empty it says nothing.
  const drawn = live || rows.length === ROWS_MAX ? rows : [...rows, { ...EMPTY, id: ROWS_MAX }];
  return (
    <FieldSet legend="Setup" name="spans" error={errorOf("spans")} hint={isWhole ? undefined : HINT}>
      <input type="hidden" name="gearRows" value={drawn.length} />
      <ol className="flex flex-col gap-4">
        {drawn.map((row, index) => (
          <li key={row.id} className={isWhole ? undefined : "rule-hair pb-4"}>
            <GearRow
              stretch={stretch}
              row={row}
              index={index}
              isWhole={isWhole}
              errorOf={errorOf}
              setups={setups}
              timeZone={timeZone}
              onFill={(ends) =>
                setRows(rows.map((one) => (one === row ? { ...one, ...ends, filled: one.filled + 1 } : one)))
              }
              onRemove={
                live && rows.length > 1
                  ? () => {
                      setRows(rows.filter((one) => one !== row));
                      document.getElementById(fieldId("gear-setup-0"))?.focus();
                    }
                  : undefined
              }
            />
          </li>
        ))}
      </ol>
      {live && (
        <div className="mt-4 flex flex-wrap gap-3">
          {rows.length < ROWS_MAX && (
            <Button
              size="small"
              onClick={() => {
                nextId.current += 1;
                setRows([...rows, { ...EMPTY, id: nextId.current }]);
              }}
            >
              Add a setup ridden after it
            </Button>
          )}
          {isWhole && (
            <Button size="small" onClick={() => setPart(true)}>
              Only for a part of the session
            </Button>
          )}
        </div>
      )}
    </FieldSet>
  );
}

const HINT =
  "Local times. An end left empty is where the setup before or after it changes, or the session’s own.";
const EMPTY = { setupId: "", from: "", to: "", filled: 0 };

function GearRow(props: {
  stretch: Stretch | null;
  row: Row;
  index: number;
  isWhole: boolean;
  errorOf: (name: string) => string | undefined;
  setups: readonly SetupOption[];
  timeZone: string;
  onFill: (ends: { from: string; to: string }) => void;
  onRemove: (() => void) | undefined;
}) {
  const { stretch, row, index, isWhole, errorOf, setups, timeZone, onFill, onRemove } = props;
  const [setupName, fromName, toName] = [`gear-setup-${index}`, `gear-from-${index}`, `gear-to-${index}`];
  return (
    <div className="flex flex-col gap-3">
      <SelectField
        name={setupName}
        label={isWhole ? "Ridden for the whole session" : `Setup ${index + 1}`}
        empty="None"
        options={setups}
        defaultValue={row.setupId}
        error={errorOf(setupName)}
      />
      {!isWhole && (
        <>
          <div key={row.filled} className="grid grid-cols-2 items-end gap-4">
            <TextField
              name={fromName}
              label="From"
              defaultValue={row.from}
              error={errorOf(fromName)}
              autoComplete="off"
            />
            <TextField
              name={toName}
              label="To"
              defaultValue={row.to}
              error={errorOf(toName)}
              autoComplete="off"
            />
          </div>
          <div className="flex flex-wrap items-center gap-3">
            <StretchButton
              stretch={stretch}
              timeZone={timeZone}
              what={`for setup ${index + 1}`}
              onUse={onFill}
            />
            {onRemove && (
              <Button size="small" onClick={onRemove}>
                Remove<span className="sr-only"> setup {index + 1}</span>
              </Button>
            )}
          </div>
        </>
      )}
    </div>
  );
}
