"use client";

import { Button } from "@/components/ui/button";
import { useLive } from "@/components/ui/use-live";
import { csvText, type CsvCell } from "@/lib/display/csv";

/** Saves a table of the page as a CSV file, made in the browser when it is asked for. */
export function CsvButton({
  fileName,
  what,
  rows,
}: {
  fileName: string;
  /** What the file holds, for the accessible name: "on-foil segments". */
  what: string;
  rows: () => (readonly CsvCell[])[];
}) {
  const live = useLive();
  if (!live) return null;
  return (
    <Button
      size="small"
      onClick={() => {
        const url = URL.createObjectURL(new Blob([csvText(rows())], { type: "text/csv;charset=utf-8" }));
        const link = document.createElement("a");
        link.href = url;
        link.download = fileName;
        link.click();
        // The browser reads the file after the click has returned.
        setTimeout(() => URL.revokeObjectURL(url), 10_000);
      }}
    >
      CSV<span className="sr-only"> of {what}</span>
    </Button>
  );
}
