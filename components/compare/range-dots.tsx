import { niceTicks } from "@/lib/display/ticks";

export type RangeRow = {
  readonly key: string;
  readonly name: string;
  readonly evidence: string;
  /** Null when no value is there. */
  readonly spread: {
    readonly min: number;
    readonly low: number;
    readonly median: number;
    readonly high: number;
    readonly max: number;
  } | null;
};

const PAD_SHARE = 0.06;
/** Name above its dots on a phone, beside them where there is room. */
const COLUMNS = "grid gap-x-3 sm:grid-cols-[minmax(0,2fr)_minmax(0,3fr)]";

/**
 * Dots with ranges on one axis: thin line from least to most, thick line over the middle half, dot at the
 * median. Positions are percentages, so it fits any width without a script; the table beside it says the same.
 */
export function RangeDots(props: {
  rows: readonly RangeRow[];
  format: (value: number) => string;
  unit: string;
}) {
  const { rows, format, unit } = props;
  const spreads = rows.flatMap((row) => (row.spread === null ? [] : [row.spread]));
  if (spreads.length === 0)
    return <p className="text-muted py-4">No value yet for what the filter leaves.</p>;
  const least = Math.min(...spreads.map((spread) => spread.min));
  const most = Math.max(...spreads.map((spread) => spread.max));
  const span = most > least ? most - least : Math.max(Math.abs(most) * 0.1, 1e-6);
  const from = least - span * PAD_SHARE;
  const width = span * (1 + 2 * PAD_SHARE);
  const at = (value: number) => `${(((value - from) / width) * 100).toFixed(2)}%`;
  const ticks = niceTicks(least, least + span, 4);
  return (
    <div className="rule-ink" aria-hidden="true">
      {rows.map((row) => (
        <div key={row.key} className={`rule-hair items-center py-1 ${COLUMNS}`}>
          <div className="flex min-w-0 flex-wrap items-baseline justify-between gap-x-3 sm:block">
            <p className="font-medium">{row.name}</p>
            <p className="text-muted text-sm">{row.evidence}</p>
          </div>
          <svg className="h-10 w-full overflow-visible" role="presentation">
            {ticks.map((tick) => (
              <line key={tick} x1={at(tick)} x2={at(tick)} y1="0" y2="40" stroke="var(--hairline)" />
            ))}
            {row.spread !== null && (
              <>
                <line x1={at(row.spread.min)} x2={at(row.spread.max)} y1="20" y2="20" stroke="var(--ink)" />
                <line
                  x1={at(row.spread.low)}
                  x2={at(row.spread.high)}
                  y1="20"
                  y2="20"
                  stroke="var(--ink)"
                  strokeWidth="5"
                />
                <circle
                  cx={at(row.spread.median)}
                  cy="20"
                  r="6"
                  fill="var(--buoy)"
                  stroke="var(--paper)"
                  strokeWidth="1.5"
                />
              </>
            )}
          </svg>
        </div>
      ))}
      <div className={COLUMNS}>
        <p className="text-muted order-2 text-sm sm:order-none">{unit}</p>
        <svg className="h-6 w-full overflow-visible" role="presentation">
          {ticks.map((tick) => (
            <text
              key={tick}
              x={at(tick)}
              y="16"
              textAnchor="middle"
              className="num"
              fontSize="12"
              fill="var(--muted)"
            >
              {format(tick)}
            </text>
          ))}
        </svg>
      </div>
    </div>
  );
}
