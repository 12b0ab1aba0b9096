import { refusal } from "./refusal";

/**
 * How much of a file is read before it is refused. Bytes, characters, milliseconds and plain counts.
 *
 * `sentBytes` bounds what must be held whole (zip, FIT); `unpackedBytes` and `fixes` are shared by all
 * files of one archive; `minFixes` is how many usable fixes make a track; `textLength` bounds one run of
 * text, one comment or one CDATA block.
 */
export type ReadLimits = {
  readonly sentBytes: number;
  readonly unpackedBytes: number;
  readonly fixes: number;
  readonly minFixes: number;
  readonly files: number;
  readonly depth: number;
  readonly attributes: number;
  readonly attributeLength: number;
  readonly textLength: number;
  readonly timeMs: number;
};

/**
 * The limits that hold unless a caller says otherwise: far above any real recording (a million fixes is 28
 * hours at 10 Hz; real GPX nests 8 deep), far below what hurts the machine. Common practice, no source.
 *
 * @example
 * DEFAULT_READ_LIMITS.fixes; // 1000000
 */
export const DEFAULT_READ_LIMITS: ReadLimits = {
  sentBytes: 64 * 1024 * 1024,
  unpackedBytes: 400 * 1024 * 1024,
  fixes: 1_000_000,
  minFixes: 2,
  files: 50,
  depth: 96,
  attributes: 128,
  attributeLength: 64 * 1024,
  textLength: 16 * 1024 * 1024,
  timeMs: 20_000,
};

/**
 * What is left to spend while one upload is read; every overspending throws the refusal that says so.
 *
 * Units: bytes, fixes, milliseconds of `nowMs`, a monotonic clock handed in by the caller (null: no deadline).
 * Errors: ParseError `too_large_unpacked`, `too_many_fixes`, `took_too_long`.
 *
 * @example
 * new ReadBudget({ ...DEFAULT_READ_LIMITS, fixes: 7 }, null).limits.fixes; // 7
 */
export class ReadBudget {
  readonly limits: ReadLimits;
  private bytesLeft: number;
  private fixesLeft: number;
  private readonly nowMs: (() => number) | null;
  private readonly deadlineMs: number;

  constructor(limits: ReadLimits, nowMs: (() => number) | null) {
    this.limits = limits;
    this.bytesLeft = limits.unpackedBytes;
    this.fixesLeft = limits.fixes;
    this.nowMs = nowMs;
    this.deadlineMs = nowMs === null ? 0 : nowMs() + limits.timeMs;
  }

  spendBytes(bytes: number): void {
    this.bytesLeft -= bytes;
    if (this.bytesLeft < 0) {
      throw refusal("too_large_unpacked", { limit: megabytes(this.limits.unpackedBytes) });
    }
    if (this.nowMs !== null && this.nowMs() > this.deadlineMs) throw refusal("took_too_long");
  }

  spendFix(): void {
    if (--this.fixesLeft < 0) {
      throw refusal("too_many_fixes", { limit: this.limits.fixes.toLocaleString("en") });
    }
  }
}

function megabytes(bytes: number): string {
  return `${Math.round(bytes / (1024 * 1024))} MB`;
}
