import { RangeDots } from "@/components/compare/range-dots";
import { Section } from "@/components/ui/section";
import { formatNumber } from "@/lib/display/format-number";
import type { ComparedFigure, ComparedGroup } from "@/lib/server/compare/compare-gear";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";

export type ShownFigure = {
  readonly figure: ComparedFigure;
  readonly title: string;
  readonly unit: string;
  readonly decimals: number;
  /** From the kept value to the shown unit. */
  readonly convert: (value: number) => number;
};

/** The four figures of the comparison as shown to this rider. */
export function shownFigures(speed: SpeedUnit): readonly ShownFigure[] {
  const toSpeed = (mps: number) => speedFromMps(mps, speed);
  return [
    { figure: "bumpRidingSpeedMps", title: "Bump-riding speed", unit: speed, decimals: 1, convert: toSpeed },
    { figure: "best500mMps", title: "Best 500 m", unit: speed, decimals: 1, convert: toSpeed },
    { figure: "glideRatio", title: "Glide ratio", unit: "m per m", decimals: 1, convert: (ratio) => ratio },
    {
      figure: "onFoilShare",
      title: "On-foil share",
      unit: "% of way",
      decimals: 1,
      convert: (share) => share * 100,
    },
  ];
}

/** One figure for every group as dots with ranges. */
export function FigurePanel({ shown, groups }: { shown: ShownFigure; groups: readonly ComparedGroup[] }) {
  const rows = groups.map((group) => {
    const spread = group.figures[shown.figure];
    return {
      key: group.key,
      name: group.name,
      evidence: `${group.sessions} ${group.sessions === 1 ? "session" : "sessions"}, ${group.days} ${group.days === 1 ? "day" : "days"}`,
      spread:
        spread === null
          ? null
          : {
              min: shown.convert(spread.min),
              low: shown.convert(spread.low),
              median: shown.convert(spread.median),
              high: shown.convert(spread.high),
              max: shown.convert(spread.max),
            },
    };
  });
  return (
    <Section
      id={shown.figure}
      title={shown.title}
      reading="Dot: median. Thick: middle half. Thin: least to most."
      className="min-w-0"
    >
      <RangeDots rows={rows} format={(value) => formatNumber(value, shown.decimals)} unit={shown.unit} />
    </Section>
  );
}
