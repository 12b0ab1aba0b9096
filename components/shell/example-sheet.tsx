import { FigureList, type Figure } from "@/components/ui/figure-list";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber } from "@/lib/display/format-number";
import { formatShare } from "@/lib/display/format-quantity";
import { SPEED_BANDS, speedBand } from "@/lib/display/speed-ramp";
import { speedToMps } from "@/lib/units/speed";
import { EXAMPLE_MINUTES, EXAMPLE_SWAP_MINUTE, exampleRun, type ExamplePoint } from "./example-run";

const RUN = exampleRun();
const LENGTH_KM = RUN.distanceKm;
const LOW_KN = 8;
const HIGH_KN = 20;
const SCALE = { lowMps: speedToMps(LOW_KN, "kn"), highMps: speedToMps(HIGH_KN, "kn") };

/* Drawings stretch to their frame, words do not: lines are SVG without a ratio, labels are type beside them. */
const WIDTH = 1000;
const atKm = (km: number) => ((km / LENGTH_KM) * WIDTH).toFixed(1);
const atMinute = (minute: number) => ((minute / EXAMPLE_MINUTES) * WIDTH).toFixed(1);

const KM_STEP = 4;
const KM_TICKS = Array.from({ length: Math.floor(LENGTH_KM / KM_STEP) + 1 }, (_, i) => i * KM_STEP);

const FIGURES: readonly Figure[] = [
  { label: "Best 500 m", value: formatNumber(RUN.best500Kn, 1), unit: "kn", big: true },
  { label: "On foil", value: formatShare(RUN.onFoilShare), unit: "% of way", big: true },
  { label: "Distance under way", value: formatNumber(LENGTH_KM, 2), unit: "km" },
  { label: "Elapsed", value: formatDuration(EXAMPLE_MINUTES * 60) },
  { label: "Longest on-foil segment", value: formatNumber(RUN.longestKm, 2), unit: "km" },
  { label: "Bump rides", value: String(RUN.rides.length) },
];

/** A session as Trimwake prints it, from invented numbers and marked as such. */
export function ExampleSheet() {
  return (
    <figure className="frame">
      <figcaption className="border-hairline flex flex-wrap items-baseline justify-between gap-x-6 border-b px-4 py-2">
        <span className="font-semibold">Slettestrand to Blokhus</span>
        <span className="text-muted text-sm">An example: this run and its numbers are invented</span>
      </figcaption>
      <p className="sr-only">
        A downwinder with {RUN.segments.length} on-foil segments. After {EXAMPLE_SWAP_MINUTE} minutes half a
        degree was added under the rear wing. The figures of the run follow.
      </p>
      <div className="grid lg:grid-cols-[minmax(0,1fr)_22rem]">
        <div aria-hidden="true" className="min-w-0 py-3">
          <Drawings />
        </div>
        <div className="border-hairline border-t px-4 pb-4 lg:border-t-0 lg:border-l lg:pt-2">
          <FigureList figures={FIGURES} ruled={false} />
        </div>
      </div>
    </figure>
  );
}

function Drawings() {
  const share = (minute: number) => `${(minute / EXAMPLE_MINUTES) * 100}%`;
  const km = KM_TICKS.map((at) => ({ share: at / LENGTH_KM, text: at === 0 ? "0 km" : `${at}` }));
  const minutes = [0, 15, 30, 45, 60].map((at) => ({
    share: at / EXAMPLE_MINUTES,
    text: at === 0 ? "0 min" : `${at}`,
  }));
  return (
    <>
      <div className="px-4">
        <Title
          words="The run, unrolled"
          reading="downwind to the right, colour is speed, dashes are off foil"
        />
        <Unrolled />
        <Scale ticks={km} />
      </div>
      <div className="px-4 pt-4">
        <Title words="Timeline" reading="speed in knots, on-foil segments, bump rides, gear" />
        <Timeline />
        <Scale ticks={minutes} />
        <div className="num mt-2 flex text-xs">
          <span
            className="border-ink bg-kelp truncate border px-2 py-1"
            style={{ width: share(EXAMPLE_SWAP_MINUTE) }}
          >
            A no shim
          </span>
          <span className="border-ink bg-shell flex-1 truncate border border-l-0 px-2 py-1">B same, +½°</span>
        </div>
      </div>
    </>
  );
}

function Title({ words, reading }: { words: string; reading: string }) {
  return (
    <p className="flex flex-wrap items-baseline gap-x-3">
      <span className="font-bold [font-stretch:118%]">{words}</span>
      <span className="text-muted text-sm">{reading}</span>
    </p>
  );
}

function Scale({ ticks }: { ticks: readonly { share: number; text: string }[] }) {
  return (
    <div className="num text-muted relative h-5 text-xs">
      {ticks.map((tick) => (
        <span
          key={tick.text}
          className={tick.share > 0.9 ? "absolute -translate-x-full pr-1" : "absolute pl-1"}
          style={{ left: `${tick.share * 100}%` }}
        >
          {tick.text}
        </span>
      ))}
    </div>
  );
}

/** Consecutive points of one band as one line, so that 800 points become some hundred short lines. */
function bandLines(points: readonly ExamplePoint[]) {
  const lines: { band: number | null; path: string }[] = [];
  let current: { band: number | null; path: string } | null = null;
  for (const point of points) {
    const band = point.onFoil ? speedBand(speedToMps(point.speedKn, "kn"), SCALE) : null;
    const place = `${atKm(point.km)} ${(60 - point.acrossM / 5).toFixed(1)}`;
    if (current !== null) current.path += `L${place}`;
    if (current === null || current.band !== band) {
      current = { band, path: `M${place}` };
      lines.push(current);
    }
  }
  return lines;
}

function Unrolled() {
  return (
    <svg viewBox={`0 0 ${WIDTH} 120`} preserveAspectRatio="none" className="mt-1 block h-28 w-full sm:h-36">
      {KM_TICKS.slice(1).map((km) => (
        <path key={km} d={`M${atKm(km)} 0V120`} stroke="var(--hairline)" vectorEffect="non-scaling-stroke" />
      ))}
      <path d={`M0 60H${WIDTH}`} stroke="var(--hairline)" vectorEffect="non-scaling-stroke" />
      {bandLines(RUN.points).map((line) => (
        <path
          key={line.path}
          d={line.path}
          fill="none"
          stroke={line.band === null ? "var(--muted)" : `var(--speed-${line.band})`}
          strokeWidth={line.band === null ? 1.5 : 1.8 + (line.band / (SPEED_BANDS - 1)) * 2.4}
          strokeDasharray={line.band === null ? "3 3" : undefined}
          vectorEffect="non-scaling-stroke"
        />
      ))}
    </svg>
  );
}

function Timeline() {
  const y = (speedKn: number) => (100 - (speedKn / 20) * 100).toFixed(1);
  const speed = RUN.points
    .map((p, i) => `${i === 0 ? "M" : "L"}${atMinute(p.minute)} ${y(p.speedKn)}`)
    .join("");
  const comb = RUN.rides
    .map((r) => `M${atMinute(r.minute)} 130V${(130 - r.gainKn * 3.4).toFixed(1)}`)
    .join("");
  return (
    <div className="relative mt-1">
      {[5, 10, 15].map((kn) => (
        <span
          key={kn}
          className="num text-muted bg-sheet absolute z-10 -translate-y-full pr-1 text-xs leading-tight"
          style={{ top: `${(Number(y(kn)) / 132) * 100}%` }}
        >
          {kn}
        </span>
      ))}
      <svg viewBox={`0 0 ${WIDTH} 132`} preserveAspectRatio="none" className="block h-36 w-full sm:h-44">
        {[5, 10, 15].map((kn) => (
          <path
            key={kn}
            d={`M0 ${y(kn)}H${WIDTH}`}
            stroke="var(--hairline)"
            vectorEffect="non-scaling-stroke"
          />
        ))}
        <path
          d={speed}
          fill="none"
          stroke="var(--swell)"
          strokeWidth="1.3"
          vectorEffect="non-scaling-stroke"
        />
        {RUN.segments.map((segment) => (
          <rect
            key={segment.fromMinute}
            x={atMinute(segment.fromMinute)}
            y="104"
            width={atMinute(segment.toMinute - segment.fromMinute)}
            height="7"
            fill="var(--ink)"
          />
        ))}
        <path d={comb} stroke="var(--buoy)" strokeWidth="1" vectorEffect="non-scaling-stroke" />
      </svg>
    </div>
  );
}
