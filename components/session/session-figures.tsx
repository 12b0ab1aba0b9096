"use client";

import { useRef } from "react";
import { Button } from "@/components/ui/button";
import { FigureList } from "@/components/ui/figure-list";
import { Section } from "@/components/ui/section";
import type { Discipline, Figures } from "@/lib/analysis/analysis";
import type { DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";
import { bestRows, bumpRows, mainRows, wayRows } from "./figure-rows";

type Props = {
  figures: Figures;
  discipline: Discipline;
  units: { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
  /** What the figures are of: "Whole session" or the stretch in words. */
  of: string;
  /** Goes back to the whole session; given while a stretch is brushed. */
  onWhole?: () => void;
};

/** The figures beside the map: the three a session is about, then how far and how long. */
export function MainFigures({ figures, discipline, units, of, onWhole }: Props) {
  const head = useRef<HTMLParagraphElement>(null);
  return (
    <div>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 pb-1">
        <p ref={head} tabIndex={-1} className="text-muted text-sm" role="status">
          {of}
        </p>
        {onWhole !== undefined && (
          <Button
            look="quiet"
            size="small"
            className="no-print"
            onClick={() => {
              // The button goes away with the stretch: the focus stays where it was.
              head.current?.focus();
              onWhole();
            }}
          >
            Whole session
          </Button>
        )}
      </div>
      <FigureList figures={[...mainRows(figures, discipline, units), ...wayRows(figures, units)]} />
    </div>
  );
}

/** What a brushed stretch came to, beside the timeline where it was brushed: the figures it was brushed for. */
export function StretchFigures({ figures, discipline, units }: Omit<Props, "of" | "onWhole">) {
  const rows = [
    ...mainRows(figures, discipline, units).map((row) => ({ ...row, big: false })),
    ...wayRows(figures, units).slice(0, 1),
    ...bestRows(figures, units).filter((row) => row.label === "Best 10 s" || row.label === "Best 500 m"),
  ];
  return (
    <div className="mt-4 grid items-start gap-x-10 sm:grid-cols-2">
      <FigureList figures={rows.slice(0, 3)} />
      <FigureList figures={rows.slice(3)} />
    </div>
  );
}

/** The rest of the figures: bests with their standard error, and how the bumps were ridden. */
export function MoreFigures({ figures, units, of }: Omit<Props, "discipline" | "onWhole">) {
  const bests = bestRows(figures, units);
  const bumps = bumpRows(figures, units);
  const half = Math.ceil(bests.length / 2);
  return (
    <Section
      id="bests"
      title="Bests and bumps"
      reading={`${of}. Each best with its standard error, corrected for the luck of a maximum.`}
    >
      <div className="grid items-start gap-x-10 md:grid-cols-2 xl:grid-cols-3 print:grid-cols-3 print:gap-x-6">
        <FigureList figures={bests.slice(0, half)} />
        <FigureList figures={bests.slice(half)} />
        {bumps.length > 0 && <FigureList figures={bumps} />}
      </div>
    </Section>
  );
}
