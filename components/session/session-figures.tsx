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
};

/** The figures beside the map: the three a session is about, then how far and how long. */
export function MainFigures({ figures, discipline, units, of }: Props) {
  return (
    <div>
      <p className="text-muted pb-1 text-sm" role="status">
        {of}
      </p>
      <FigureList figures={[...mainRows(figures, discipline, units), ...wayRows(figures, units)]} />
    </div>
  );
}

/** The rest of the figures: bests with their standard error, and how the bumps were ridden. */
export function MoreFigures({ figures, units, of }: Omit<Props, "discipline">) {
  const bests = bestRows(figures, units);
  const bumps = bumpRows(figures, units);
  const half = Math.ceil(bests.length / 2);
  return (
    <Section
      id="bests"
      title="Bests and bumps"
      reading={`${of}. Each best with its standard error, corrected for the luck of a maximum.`}
    >
      <div className="grid items-start gap-x-10 md:grid-cols-2 xl:grid-cols-3">
        <FigureList figures={bests.slice(0, half)} />
        <FigureList figures={bests.slice(half)} />
        {bumps.length > 0 && <FigureList figures={bumps} />}
      </div>
    </Section>
  );
}
