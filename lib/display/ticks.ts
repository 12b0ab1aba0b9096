/**
 * Round values (1, 2 or 5 times a power of ten apart) that cover an interval from the inside, about `wanted` of
 * them. Empty when the interval is not finite or has no length.
 * Source: common practice, no source.
 *
 * @example
 * niceTicks(0, 22, 5); // [0, 5, 10, 15, 20]
 */
export function niceTicks(low: number, high: number, wanted: number): number[] {
  if (!Number.isFinite(low) || !Number.isFinite(high) || high <= low || wanted < 1) return [];
  const step = niceStep((high - low) / wanted);
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  const decimals = Math.max(0, -Math.floor(Math.log10(step)));
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) =>
    Number(((first + i) * step).toFixed(decimals)),
  );
}

/**
 * The step of 1, 2 or 5 times a power of ten nearest to a raw one. NaN for what is not above zero.
 *
 * @example
 * niceStep(4.4); // 5
 */
export function niceStep(raw: number): number {
  if (!(raw > 0) || !Number.isFinite(raw)) return NaN;
  const power = 10 ** Math.floor(Math.log10(raw));
  const lead = raw / power;
  const nice = lead < 1.5 ? 1 : lead < 3.5 ? 2 : lead < 7.5 ? 5 : 10;
  // One significant digit: takes the binary tail off products such as 3 x 0.1.
  return Number((nice * power).toPrecision(1));
}

const TIME_STEPS_S = [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1800, 3600, 7200, 10800, 21600, 43200];

/**
 * Instants (UTC epoch milliseconds) at round clock times of a zone inside an interval, about `wanted` of them.
 * The offset is the zone's minutes ahead of UTC (zoneOffsetMin), so that half-hour zones get round labels too.
 *
 * @example
 * timeTicks(0, 3600000, { wanted: 4, offsetMin: 0 }); // [0, 900000, 1800000, 2700000, 3600000]
 */
export function timeTicks(
  startMs: number,
  endMs: number,
  options: { readonly wanted: number; readonly offsetMin: number },
): number[] {
  if (!Number.isFinite(startMs) || !Number.isFinite(endMs) || endMs <= startMs) return [];
  const raw = (endMs - startMs) / 1000 / Math.max(1, options.wanted);
  const stepMs = 1000 * (TIME_STEPS_S.find((step) => step >= raw * 0.8) ?? 86400);
  const offsetMs = options.offsetMin * 60000;
  const ticks: number[] = [];
  for (let t = Math.ceil((startMs + offsetMs) / stepMs) * stepMs; t - offsetMs <= endMs; t += stepMs) {
    ticks.push(t - offsetMs);
  }
  return ticks;
}
