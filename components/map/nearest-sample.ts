import type { TrackShape } from "./track-shape";

const METRES_PER_DEGREE = 111_195.08;
/** Samples this much farther than the nearest count as equally near: passes that lie on one another. */
const SAME_PLACE_M = 3;

/** What a second of distance in time to the cursor counts like, metres; never more than SAME_PLACE_M in all. */
const COST_M_PER_S = 0.05;

/** Finds the drawn sample nearest to a position. */
export type NearestSample = {
  /**
   * Index of the drawn sample nearest to a position within `radiusM`, or null. Where the track passes more
   * than once, the sample nearest to `aroundIndex` is taken, so a moving pointer stays on one pass.
   */
  find(lonDeg: number, latDeg: number, radiusM: number, aroundIndex: number | null): number | null;
};

/**
 * Sorts the drawn samples of a track into square cells, so that a search looks at a few of them only.
 * Building is linear in the samples; cells are as many as samples at most.
 */
export function nearestSample(shape: TrackShape): NearestSample {
  const { bounds, eastM, northM } = shape;
  if (bounds === null) return { find: () => null };
  const grid = buildGrid(shape);
  const middleLat = (bounds[1] + bounds[3]) / 2;
  const middleLon = (bounds[0] + bounds[2]) / 2;
  const eastPerDegree = METRES_PER_DEGREE * Math.cos((middleLat * Math.PI) / 180);
  return {
    find(lonDeg, latDeg, radiusM, aroundIndex) {
      const lon = lonDeg + 360 * Math.round((middleLon - lonDeg) / 360);
      const x = (lon - middleLon) * eastPerDegree;
      const y = (latDeg - middleLat) * METRES_PER_DEGREE;
      if (!Number.isFinite(x) || !Number.isFinite(y)) return null;
      // Squares order like distances and cost a tenth.
      const squared = (sample: number) => {
        const dx = (eastM[sample] ?? 0) - x;
        const dy = (northM[sample] ?? 0) - y;
        return dx * dx + dy * dy;
      };
      let leastSquared = Infinity;
      let nearest = -1;
      grid.forEachWithin(x, y, radiusM, (sample) => {
        const away = squared(sample);
        if (away < leastSquared) {
          leastSquared = away;
          nearest = sample;
        }
      });
      const least = Math.sqrt(leastSquared);
      if (least > radiusM) return null;
      if (aroundIndex === null) return nearest;
      let found = nearest;
      let foundCost = Infinity;
      // A second look, at the samples about as near only: those of other passes.
      grid.forEachWithin(x, y, least + SAME_PLACE_M, (sample) => {
        const away = Math.sqrt(squared(sample));
        const apartS = (Math.abs(sample - aroundIndex) * shape.series.stepMs) / 1000;
        const cost = away + Math.min(SAME_PLACE_M, COST_M_PER_S * apartS);
        if (away <= least + SAME_PLACE_M && cost < foundCost) {
          found = sample;
          foundCost = cost;
        }
      });
      return found;
    },
  };
}

type Grid = {
  /** Visits every sample within a radius, and some beyond it. */
  forEachWithin(x: number, y: number, radiusM: number, visit: (sample: number) => void): void;
};

/** Cells as one sorted column of samples and the place where each cell begins (counting sort). */
function buildGrid({ bounds, drawn, eastM, northM }: TrackShape): Grid {
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity];
  let count = 0;
  for (let i = 0; i < drawn.length; i += 1) {
    if (drawn[i] !== 1) continue;
    const x = eastM[i] ?? 0;
    const y = northM[i] ?? 0;
    count += 1;
    if (x < minX) minX = x;
    if (x > maxX) maxX = x;
    if (y < minY) minY = y;
    if (y > maxY) maxY = y;
  }
  if (bounds === null || count === 0) return { forEachWithin: () => undefined };
  const cellM = Math.max(20, Math.sqrt(((maxX - minX + 1) * (maxY - minY + 1)) / count) * 2);
  const columns = Math.floor((maxX - minX) / cellM) + 1;
  const rows = Math.floor((maxY - minY) / cellM) + 1;
  const cells = new Int32Array(drawn.length).fill(-1);
  const begins = new Uint32Array(columns * rows + 1);
  for (let i = 0; i < drawn.length; i += 1) {
    if (drawn[i] !== 1) continue;
    const row = Math.floor(((northM[i] ?? 0) - minY) / cellM);
    const cell = row * columns + Math.floor(((eastM[i] ?? 0) - minX) / cellM);
    cells[i] = cell;
    begins[cell + 1] = (begins[cell + 1] ?? 0) + 1;
  }
  for (let cell = 1; cell < begins.length; cell += 1)
    begins[cell] = (begins[cell] ?? 0) + (begins[cell - 1] ?? 0);
  const filled = begins.slice();
  const samples = new Uint32Array(count);
  for (let i = 0; i < drawn.length; i += 1) {
    const cell = cells[i] ?? -1;
    if (cell < 0) continue;
    const place = filled[cell] ?? 0;
    samples[place] = i;
    filled[cell] = place + 1;
  }
  const column = (x: number) => Math.min(columns - 1, Math.max(0, Math.floor((x - minX) / cellM)));
  const row = (y: number) => Math.min(rows - 1, Math.max(0, Math.floor((y - minY) / cellM)));
  return {
    forEachWithin(x, y, radiusM, visit) {
      const first = column(x - radiusM);
      const last = column(x + radiusM);
      for (let r = row(y - radiusM); r <= row(y + radiusM); r += 1) {
        const end = begins[r * columns + last + 1] ?? 0;
        for (let place = begins[r * columns + first] ?? 0; place < end; place += 1)
          visit(samples[place] ?? 0);
      }
    },
  };
}
