import type { Best, BestKey, Discipline, Figures, Withheld } from "@/lib/analysis/analysis";
import type { Figure } from "@/components/ui/figure-list";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { formatShare } from "@/lib/display/format-quantity";
import { formatSpeed } from "@/lib/display/format-speed";
import { showDistance } from "@/lib/display/format-distance";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";
import type { DistanceUnit } from "@/lib/units/length";

type Units = { readonly speed: SpeedUnit; readonly distance: DistanceUnit };

const handbook = (key: string) => `/handbook/${key}`;

const WITHHELD: Readonly<Record<Withheld["withheld"], string>> = {
  too_short: "shorter than this",
  quality: "quality below B",
};

const BEST_NAMES: Readonly<Record<BestKey, string>> = {
  s2: "Best 2 s",
  s10: "Best 10 s",
  s60: "Best 60 s",
  s600: "Best 10 min",
  s3600: "Best 60 min",
  m100: "Best 100 m",
  m250: "Best 250 m",
  m500: "Best 500 m",
  m1000: "Best 1000 m",
  nm: "Best nautical mile",
};

function bestRow(key: BestKey, best: Best | Withheld, speed: SpeedUnit): Figure {
  const label = BEST_NAMES[key];
  const href = handbook(key);
  if ("withheld" in best) return { label, href, value: null, note: WITHHELD[best.withheld] };
  const error = formatNumber(speedFromMps(best.seMps, speed), 1);
  return {
    label,
    href,
    value: formatSpeed(best.speedMps, speed),
    unit: speed,
    error: error === "0.0" ? "<0.1" : error,
  };
}

/** The figures a session is about, large: they differ by discipline. */
export function mainRows(figures: Figures, discipline: Discipline, units: Units): Figure[] {
  const { bumps, glide } = figures;
  const riding: Figure =
    bumps === null
      ? {
          label: "Bump-riding speed",
          value: null,
          note: "no bump rides",
          big: true,
          href: handbook("bumps.ridingSpeedMps"),
        }
      : {
          label: "Bump-riding speed",
          value: formatSpeed(bumps.ridingSpeedMps, units.speed),
          unit: units.speed,
          error: formatNumber(speedFromMps(bumps.ridingSpeedSeMps, units.speed), 1),
          big: true,
        };
  const glideRow: Figure =
    glide === null
      ? { label: "Glide ratio", value: null, note: "too few lulls", big: true }
      : {
          label: discipline === "downwind" ? "Glide ratio, apparent" : "Glide ratio",
          value: formatNumber(glide.ratio, 1),
          error: formatNumber((glide.ratioHigh - glide.ratioLow) / 4, 1),
          note: `${glide.lulls} lulls`,
          big: true,
        };
  const onFoil: Figure = {
    label: "On foil",
    value: formatShare(figures.onFoilShareOfDistance),
    unit: "% of way",
    big: true,
  };
  return [riding, glideRow, onFoil];
}

const length = (metres: number, unit: DistanceUnit) => showDistance(metres, unit);

/** How far and how long. */
export function wayRows(figures: Figures, units: Units): Figure[] {
  const way = length(figures.waterDistanceM, units.distance);
  const error = length(figures.waterDistanceSeM, units.distance);
  const longest = length(figures.longestSegmentM, units.distance);
  const onFoil = length(figures.onFoilDistanceM, units.distance);
  return [
    { label: "Distance under way", ...way, note: `± ${error.value}\u00a0${error.unit}` },
    { label: "On-foil distance", ...onFoil },
    {
      label: "Elapsed, moving",
      value: formatDuration(figures.elapsedS),
      note: formatDuration(figures.movingS),
    },
    {
      label: "Time on foil",
      value: formatDuration(figures.onFoilTimeS),
      note: `${formatShare(figures.onFoilShareOfTime)} %`,
    },
    { label: "Longest on-foil segment", ...longest, note: formatDuration(figures.longestSegmentS) },
    { label: "Take-offs, touchdowns", value: String(figures.takeoffs), note: String(figures.touchdowns) },
  ];
}

/** How fast: the bests that the recording can carry. */
export function bestRows(figures: Figures, units: Units): Figure[] {
  const keys = Object.keys(BEST_NAMES) as BestKey[];
  const rows = keys.map((key) => bestRow(key, figures.bests[key], units.speed));
  const tens: Figure =
    figures.bestTensMeanMps === null
      ? { label: "Mean of the best five 10 s", value: null, note: "fewer than five" }
      : {
          label: "Mean of the best five 10 s",
          value: formatSpeed(figures.bestTensMeanMps, units.speed),
          unit: units.speed,
        };
  return [...rows, tens];
}

/** How the bumps were ridden; empty without bumps. */
export function bumpRows(figures: Figures, units: Units): Figure[] {
  const { bumps } = figures;
  if (bumps === null) return [];
  return [
    { label: "Bump rides", value: String(bumps.rides) },
    { label: "Bump rides per km", value: formatNumber(bumps.ridesPerKm, 1) },
    { label: "Bump rides per hour", value: formatNumber(bumps.ridesPerHour, 0) },
    { label: "Mean gain of a surge", value: formatSpeed(bumps.gainMpsMean, units.speed), unit: units.speed },
    { label: "Median time between peaks", value: formatNumber(bumps.intervalSMedian, 1), unit: "s" },
    { label: "Lulls that kept the foil", value: formatShare(bumps.lullsKeptShare), unit: "%" },
  ];
}
