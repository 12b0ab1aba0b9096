import type { Fixes } from "@/lib/track/fixes";

/** The columns a fix may lack. */
export type OptionalColumn = "elevationM" | "heartRateBpm" | "receiverSpeedMps" | "hdop" | "satellites";

const BLOCK_BITS = 13;
const BLOCK_ROWS = 1 << BLOCK_BITS;
const BLOCK_MASK = BLOCK_ROWS - 1;

/** One quantity in blocks: growing never copies, so the peak is the data plus one block. */
class Column {
  private blocks: Float64Array[] = [];
  private readonly empty: number;

  constructor(empty: number) {
    this.empty = empty;
  }

  set(row: number, value: number): void {
    const index = row >>> BLOCK_BITS;
    let block = this.blocks[index];
    if (block === undefined) {
      for (let missing = this.blocks.length; missing <= index; missing++) {
        this.blocks.push(new Float64Array(BLOCK_ROWS).fill(this.empty));
      }
      block = this.blocks[index] as Float64Array;
    }
    block[row & BLOCK_MASK] = value;
  }

  get(row: number): number {
    return this.blocks[row >>> BLOCK_BITS]?.[row & BLOCK_MASK] ?? this.empty;
  }

  /** Hands the values over as one array of the kept rows and lets the blocks go. */
  take(count: number, dropped: Uint8Array | null): Float64Array {
    const length = dropped === null ? count : count - countOnes(dropped);
    const whole = new Float64Array(length);
    if (dropped === null) {
      whole.fill(this.empty, Math.min(length, this.blocks.length << BLOCK_BITS));
      this.blocks.forEach((block, index) => {
        const from = index << BLOCK_BITS;
        whole.set(block.subarray(0, Math.min(BLOCK_ROWS, length - from)), from);
      });
    } else {
      let next = 0;
      for (let row = 0; row < count; row++) if (dropped[row] === 0) whole[next++] = this.get(row);
    }
    this.blocks = [];
    return whole;
  }
}

function countOnes(flags: Uint8Array): number {
  let ones = 0;
  for (const flag of flags) ones += flag;
  return ones;
}

/**
 * Builds `Fixes` row by row: the columns have one length by construction, because only `append` makes a row.
 *
 * Shapes: rows count from 0; an optional column comes into being at its first finite value and is NaN
 * elsewhere, null when no row ever had one. `startSegment` makes the next row the first of a new recorded
 * segment; segments without a row vanish.
 * Errors: none; validation belongs to whoever appends.
 *
 * @example
 * new FixColumns().finish().count; // 0
 */
export class FixColumns {
  private rows = 0;
  private segmentPending = true;
  private segmentStarts: number[] = [];
  private readonly time = new Column(Number.NaN);
  private readonly lat = new Column(Number.NaN);
  private readonly lon = new Column(Number.NaN);
  private readonly optional = new Map<OptionalColumn, Column>();

  get count(): number {
    return this.rows;
  }

  startSegment(): void {
    this.segmentPending = true;
  }

  /** Adds a fix (UTC epoch milliseconds, degrees, degrees) and returns its row. */
  append(timeMs: number, latDeg: number, lonDeg: number): number {
    const row = this.rows++;
    if (this.segmentPending) {
      this.segmentStarts.push(row);
      this.segmentPending = false;
    }
    this.time.set(row, timeMs);
    this.lat.set(row, latDeg);
    this.lon.set(row, lonDeg);
    return row;
  }

  /** Sets a quantity of an existing row; a value that is not finite leaves it missing. */
  set(column: OptionalColumn, row: number, value: number): void {
    if (!Number.isFinite(value) || row < 0 || row >= this.rows) return;
    let values = this.optional.get(column);
    if (values === undefined) {
      values = new Column(Number.NaN);
      this.optional.set(column, values);
    }
    values.set(row, value);
  }

  latDegAt(row: number): number {
    return this.lat.get(row);
  }

  lonDegAt(row: number): number {
    return this.lon.get(row);
  }

  /** The finished track; `dropped` marks with 1 the rows to leave out. The builder is empty afterwards. */
  finish(dropped: Uint8Array | null = null): Fixes {
    const rows = this.rows;
    const takeOptional = (column: OptionalColumn): Float64Array | null => {
      const values = this.optional.get(column)?.take(rows, dropped) ?? null;
      return values !== null && values.some((value) => !Number.isNaN(value)) ? values : null;
    };
    const timeMs = this.time.take(rows, dropped);
    const fixes: Fixes = {
      count: timeMs.length,
      timeMs,
      latDeg: this.lat.take(rows, dropped),
      lonDeg: this.lon.take(rows, dropped),
      elevationM: takeOptional("elevationM"),
      heartRateBpm: takeOptional("heartRateBpm"),
      receiverSpeedMps: takeOptional("receiverSpeedMps"),
      hdop: takeOptional("hdop"),
      satellites: takeOptional("satellites"),
      segmentStarts: keptStarts(this.segmentStarts, rows, dropped),
    };
    this.rows = 0;
    this.segmentStarts = [];
    this.segmentPending = true;
    this.optional.clear();
    return fixes;
  }
}

/** Segment starts after rows were left out: a start moves to its first kept row, an emptied segment vanishes. */
function keptStarts(starts: readonly number[], rows: number, dropped: Uint8Array | null): Uint32Array {
  if (dropped === null) return Uint32Array.from(starts);
  const kept: number[] = [];
  let next = 0;
  starts.forEach((start, index) => {
    const end = starts[index + 1] ?? rows;
    const before = next;
    for (let row = start; row < end; row++) if (dropped[row] === 0) next++;
    if (next > before) kept.push(before);
  });
  return Uint32Array.from(kept);
}
