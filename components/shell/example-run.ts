/**
 * An invented downwinder for the front page's drawing: speeds and positions from sums of sines, so that it is the
 * same on every visit and nobody's track. Times in minutes, speeds in knots, the way along and across in km and m.
 */
export type ExamplePoint = {
  readonly minute: number;
  readonly km: number;
  readonly acrossM: number;
  readonly speedKn: number;
  readonly onFoil: boolean;
};

export type ExampleRun = {
  readonly points: readonly ExamplePoint[];
  readonly segments: readonly { readonly fromMinute: number; readonly toMinute: number }[];
  readonly rides: readonly { readonly minute: number; readonly gainKn: number }[];
  readonly distanceKm: number;
  readonly onFoilShare: number;
  readonly longestKm: number;
  readonly best500Kn: number;
};

export const EXAMPLE_MINUTES = 64;
/** From here on the invented rider has half a degree more shim under the rear wing. */
export const EXAMPLE_SWAP_MINUTE = 39;

const SEGMENTS = [
  { fromMinute: 2.5, toMinute: 16 },
  { fromMinute: 17.5, toMinute: 36.5 },
  { fromMinute: 41, toMinute: 49 },
  { fromMinute: 50.2, toMinute: 62.5 },
] as const;

const STEP_MIN = 0.05;

export function exampleRun(): ExampleRun {
  const points: ExamplePoint[] = [];
  let km = 0;
  for (let minute = 0; minute <= EXAMPLE_MINUTES; minute += STEP_MIN) {
    const segment = SEGMENTS.find((f) => minute >= f.fromMinute && minute < f.toMinute);
    const speedKn = segment ? flyingKn(minute, segment.fromMinute) : 2.1 + 0.6 * Math.sin(minute * 9.1);
    points.push({ minute, km, acrossM: acrossM(km), speedKn, onFoil: segment !== undefined });
    km += (speedKn * 1.852 * STEP_MIN) / 60;
  }
  const lengths = SEGMENTS.map(
    (segment) => kmAt(points, segment.toMinute) - kmAt(points, segment.fromMinute),
  );
  return {
    points,
    segments: SEGMENTS,
    rides: rides(points),
    distanceKm: km,
    onFoilShare: lengths.reduce((sum, length) => sum + length, 0) / km,
    longestKm: Math.max(...lengths),
    best500Kn: best500Kn(points),
  };
}

function flyingKn(minute: number, sinceMinute: number): number {
  const gust = 1.7 * Math.sin(minute / 4.3) + 0.8 * Math.sin(minute / 1.3 + 1);
  const bump = (1.3 + 0.7 * Math.sin(minute / 3.1)) * Math.sin(minute * 19.7 + 1.3 * Math.sin(minute * 3.3));
  const ripple = 0.4 * Math.sin(minute * 47 + 2);
  const faster = minute > EXAMPLE_SWAP_MINUTE ? 0.6 : 0;
  const settled = 1 - Math.exp(-(minute - sinceMinute) * 4);
  return 8 + settled * (6.2 + gust + bump + ripple + faster);
}

const acrossM = (km: number) =>
  130 * Math.sin(km / 2.9) + 60 * Math.sin(km / 0.83 + 1) + 22 * Math.sin(km / 0.27 + 2);

/** Peaks of speed on foil with what was gained since the lull before. */
function rides(points: readonly ExamplePoint[]): ExampleRun["rides"] {
  const found: { minute: number; gainKn: number }[] = [];
  let lullKn = Infinity;
  for (const [i, point] of points.entries()) {
    const [before, after] = [points[i - 1], points[i + 1]];
    if (!point.onFoil || !before?.onFoil || !after?.onFoil) {
      lullKn = Infinity;
      continue;
    }
    lullKn = Math.min(lullKn, point.speedKn);
    const gainKn = point.speedKn - lullKn;
    if (point.speedKn > before.speedKn && point.speedKn >= after.speedKn && gainKn >= 1) {
      found.push({ minute: point.minute, gainKn });
      lullKn = Infinity;
    }
  }
  return found;
}

const kmAt = (points: readonly ExamplePoint[], minute: number) =>
  points.find((point) => point.minute >= minute)?.km ?? NaN;

/** Fastest 500 m from point to point; the product's own figure ends its windows between fixes. */
function best500Kn(points: readonly ExamplePoint[]): number {
  let best = 0;
  for (const start of points) {
    const end = points.find((point) => point.km >= start.km + 0.5);
    if (end) best = Math.max(best, ((end.km - start.km) / 1.852 / (end.minute - start.minute)) * 60);
  }
  return best;
}
