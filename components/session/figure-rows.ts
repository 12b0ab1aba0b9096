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

/** A standard error beside its figure; a small one gets a second decimal, so that it never reads as none at all. */
function errorText(value: number): string {
  if (value >= 0.095) return formatNumber(value, 1);
  return value >= 0.005 ? formatNumber(value, 2) : "<0.01";
}

const WITHHELD: Readonly<Record<Withheld["withheld"], string>> = {
  too_short: "too short for it",
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
  return {
    label,
    href,
    value: formatSpeed(best.speedMps, speed),
    unit: speed,
    error: errorText(speedFromMps(best.seMps, speed)),
  };
}

/** The figures a session is about, large: they differ by discipline. */
export function mainRows(figures: Figures, discipline: Discipline, units: Units): Figure[] {
  const { bumps, glide } = figures;
  const riding = { label: "Bump-riding speed", href: handbook("ridingSpeedMps"), big: true };
  const ratio = {
    label: discipline === "downwind" ? "Glide ratio, apparent" : "Glide ratio",
    href: handbook("glide.ratio"),
    big: true,
  };
  return [
    bumps === null
      ? { ...riding, value: null, note: "no bump rides" }
      : {
          ...riding,
          value: formatSpeed(bumps.ridingSpeedMps, units.speed),
          unit: units.speed,
          error: errorText(speedFromMps(bumps.ridingSpeedSeMps, units.speed)),
        },
    glide === null
      ? { ...ratio, value: null, note: "too few lulls" }
      : {
          ...ratio,
          value: formatNumber(glide.ratio, 1),
          // A 95 % interval is four standard errors wide.
          error: errorText((glide.ratioHigh - glide.ratioLow) / 4),
        },
    {
      label: "On foil",
      value: formatShare(figures.onFoilShareOfDistance),
      unit: "% of way",
      href: handbook("onFoilShareOfDistance"),
      big: true,
    },
  ];
}

const length = (metres: number, unit: DistanceUnit) => showDistance(metres, unit);

/** How far and how long. */
export function wayRows(figures: Figures, units: Units): Figure[] {
  const way = length(figures.waterDistanceM, units.distance);
  const error = length(figures.waterDistanceSeM, units.distance);
  const longest = length(figures.longestSegmentM, units.distance);
  const onFoil = length(figures.onFoilDistanceM, units.distance);
  return [
    {
      label: "Distance under way",
      ...way,
      note: `± ${error.value}\u00a0${error.unit}`,
      href: handbook("waterDistanceM"),
    },
    { label: "On-foil distance", ...onFoil, href: handbook("onFoilDistanceM") },
    {
      label: "Elapsed, moving",
      value: formatDuration(figures.elapsedS),
      note: formatDuration(figures.movingS),
      href: handbook("movingS"),
    },
    {
      label: "Time on foil",
      value: formatDuration(figures.onFoilTimeS),
      note: `${formatShare(figures.onFoilShareOfTime)}\u00a0%`,
      href: handbook("onFoilTimeS"),
    },
    {
      label: "Longest on-foil segment",
      ...longest,
      note: formatDuration(figures.longestSegmentS),
      href: handbook("longestSegmentM"),
    },
    { label: "Take-offs", value: String(figures.takeoffs), href: handbook("takeoffs") },
    { label: "Touchdowns", value: String(figures.touchdowns), href: handbook("takeoffs") },
  ];
}

/** How fast: the bests that the recording can carry. */
export function bestRows(figures: Figures, units: Units): Figure[] {
  const keys = Object.keys(BEST_NAMES) as BestKey[];
  const rows = keys.map((key) => bestRow(key, figures.bests[key], units.speed));
  const tensHead = { label: "Mean of the best five 10 s", href: handbook("bestTensMeanMps") };
  const tens: Figure =
    figures.bestTensMeanMps === null
      ? { ...tensHead, value: null, note: "fewer than five" }
      : {
          ...tensHead,
          value: formatSpeed(figures.bestTensMeanMps, units.speed),
          unit: units.speed,
        };
  return [...rows, tens];
}

/** How the bumps were ridden; empty without bumps. */
export function bumpRows(figures: Figures, units: Units): Figure[] {
  const { bumps } = figures;
  if (bumps === null) return [];
  const gain = formatSpeed(bumps.gainMpsMean, units.speed);
  const interval = formatNumber(bumps.intervalSMedian, 1);
  return [
    { label: "Bump rides", value: String(bumps.rides) },
    {
      label: "Bump rides per km",
      value: formatNumber(bumps.ridesPerKm, 1),
      href: handbook("ridesPerKm"),
    },
    {
      label: "Bump rides per hour",
      value: formatNumber(bumps.ridesPerHour, 0),
      href: handbook("ridesPerHour"),
    },
    { label: "Mean gain of a surge", value: gain, unit: units.speed, href: handbook("gainMpsMean") },
    Number.isFinite(bumps.intervalSMedian)
      ? { label: "Median time between peaks", value: interval, unit: "s", href: handbook("intervalSMedian") }
      : { label: "Median time between peaks", value: null, note: "one ride alone" },
    Number.isFinite(bumps.lullsKeptShare)
      ? {
          label: "Lulls that kept the foil",
          value: formatShare(bumps.lullsKeptShare),
          unit: "%",
          href: handbook("lullsKeptShare"),
        }
      : { label: "Lulls that kept the foil", value: null, note: "no lulls" },
  ];
}
