import { ParseError, type ParseErrorCode } from "@/lib/errors/parse-error";
import type { Fixes, TrackNote } from "@/lib/track/fixes";
import { collectBytes, peekBytes, steadyPieces, type ByteSource, type PeekedBytes } from "./byte-source";
import { gunzip } from "./gunzip";
import { readFit } from "./read-fit";
import { DEFAULT_READ_LIMITS, ReadBudget, type ReadLimits } from "./read-limits";
import { XmlReader } from "./read-xml";
import { refusal } from "./refusal";
import { sniff } from "./sniff";
import type { TrackFormat, TrackRead } from "./track-read";
import { harmlessName, zipMembers, type ZipMember } from "./unzip";

/** A file that was read: its fixes in the order of the file, what it calls itself, and what was left out. */
export type FileRead = {
  readonly kind: "read";
  readonly name: string;
  readonly format: TrackFormat;
  readonly title: string | null;
  readonly fixes: Fixes;
  /** Recorded segments in the file that hold a point, usable or not. */
  readonly rawSegments: number;
  readonly notes: readonly TrackNote[];
};

/** A file that was refused; `message` is the sentence for the rider. */
export type FileRefused = {
  readonly kind: "refused";
  readonly name: string;
  readonly error: {
    readonly code: ParseErrorCode;
    readonly message: string;
    readonly format: string;
    readonly place: string | null;
  };
};

export type ReadOutcome = FileRead | FileRefused;

export type ReadOptions = {
  readonly fileName: string;
  readonly limits?: Partial<ReadLimits>;
  /** A monotonic clock in milliseconds; without one there is no deadline. */
  readonly nowMs?: () => number;
};

/**
 * Reads one upload: a GPX, TCX, KML or FIT file, plain or gzip-compressed, or a zip of several.
 *
 * What the bytes are decides, never the name. One file gives one outcome; a zip gives one for each file in it
 * (also gzip-compressed ones), folders and hidden files aside. Bytes are read as they stream by and never held
 * whole, but for zip and FIT, which are bounded. Bad data never throws: it is a refusal with a sentence, or a
 * note on a track that could be kept. Errors of the source itself (a disk, a connection) pass through.
 *
 * Units: see `Fixes`. Domain: every file of at most the limits; past any of them a refusal.
 */
export async function readFile(source: ByteSource, options: ReadOptions): Promise<ReadOutcome[]> {
  const limits: ReadLimits = { ...DEFAULT_READ_LIMITS, ...options.limits };
  const budget = new ReadBudget(limits, options.nowMs ?? null);
  const name = harmlessName(options.fileName);
  const peeked = await peekBytes(steadyPieces(source));
  try {
    if (sniff(peeked.head, false).kind !== "zip") return [await readOne(peeked, name, budget)];
    return await readZip(await collectSent(peeked, limits, () => undefined), budget);
  } catch (error) {
    return [refusedOrThrow(name, error)];
  }
}

function collectSent(
  peeked: PeekedBytes,
  limits: ReadLimits,
  spend: (bytes: number) => void,
): Promise<Uint8Array> {
  let left = limits.sentBytes;
  return collectBytes(peeked.pieces, (bytes) => {
    spend(bytes);
    left -= bytes;
    if (left < 0) {
      throw refusal("too_large_unpacked", { limit: `${Math.round(limits.sentBytes / (1024 * 1024))} MB` });
    }
  });
}

function refusedOrThrow(name: string, error: unknown): FileRefused {
  if (!(error instanceof ParseError)) throw error;
  const { code, message, format, place } = error;
  return { kind: "refused", name, error: { code, message, format, place } };
}

/** One file after another; once a limit that all share is met, the rest is not opened. */
async function readZip(bytes: Uint8Array, budget: ReadBudget): Promise<ReadOutcome[]> {
  const members = await zipMembers(bytes, budget.limits.files);
  if (members.length === 0) throw refusal("no_track", { format: "zip", found: "The zip holds no files" });
  const outcomes: ReadOutcome[] = [];
  let spent: ParseError | null = null;
  for (const member of members) {
    const outcome: ReadOutcome =
      spent === null ? await readMember(member, budget) : refusedOrThrow(member.name, spent);
    outcomes.push(outcome);
    if (outcome.kind === "refused" && isShared(outcome.error.code)) {
      spent ??= new ParseError(outcome.error.code, outcome.error.message);
    }
  }
  return outcomes;
}

function isShared(code: ParseErrorCode): boolean {
  return code === "too_large_unpacked" || code === "too_many_fixes" || code === "took_too_long";
}

async function readMember(member: ZipMember, budget: ReadBudget): Promise<ReadOutcome> {
  try {
    if (member.locked) {
      throw refusal("broken_archive", { format: "zip", found: "The file is locked with a password" });
    }
    const peeked = await peekBytes(steadyPieces(member.open()));
    if (sniff(peeked.head, false).kind === "zip") {
      await closePieces(peeked);
      throw refusal("nested_archive", { format: "zip" });
    }
    return await readOne(peeked, member.name, budget);
  } catch (error) {
    return refusedOrThrow(member.name, error);
  }
}

/** A file that is no zip. */
async function readOne(peeked: PeekedBytes, name: string, budget: ReadBudget): Promise<ReadOutcome> {
  if (sniff(peeked.head, false).kind !== "gzip") return readPlain(peeked, name, budget);
  const inner = await peekBytes(steadyPieces(gunzip(peeked.pieces)));
  const { kind } = sniff(inner.head, false);
  if (kind !== "gzip" && kind !== "zip") return readPlain(inner, name, budget);
  await closePieces(inner);
  throw refusal("nested_archive", { format: "gzip" });
}

async function closePieces(peeked: PeekedBytes): Promise<void> {
  for await (const _ of peeked.pieces) break;
}

async function readPlain(peeked: PeekedBytes, name: string, budget: ReadBudget): Promise<ReadOutcome> {
  const sniffed = sniff(peeked.head, true);
  if (sniffed.kind === "fit") {
    const bytes = await collectSent(peeked, budget.limits, (length) => budget.spendBytes(length));
    return finished(name, readFit(bytes, budget), budget);
  }
  if (sniffed.kind === "xml" || (sniffed.kind === "empty" && peeked.head.length > 4096)) {
    return finished(name, await readXml(peeked, budget), budget);
  }
  await closePieces(peeked);
  if (sniffed.kind === "other") throw refusal("unknown_format", { found: sniffed.found });
  throw refusal("empty");
}

async function readXml(peeked: PeekedBytes, budget: ReadBudget): Promise<TrackRead> {
  const reader = new XmlReader(peeked.head, budget);
  let brokenArchive: ParseError | null = null;
  try {
    for await (const piece of peeked.pieces) {
      budget.spendBytes(piece.length);
      if (!reader.write(piece)) break;
    }
  } catch (error) {
    if (!(error instanceof ParseError) || error.code !== "broken_archive") throw error;
    brokenArchive = error;
  }
  try {
    return reader.end(brokenArchive !== null);
  } catch (error) {
    throw brokenArchive ?? error;
  }
}

function finished(name: string, read: TrackRead, budget: ReadBudget): FileRead {
  const { sink, format, title, rawSegments } = read;
  const fixes = sink.finish();
  if (fixes.count === 0) throw read.whyEmpty();
  const { minFixes } = budget.limits;
  if (fixes.count < minFixes) {
    throw refusal("too_few_fixes", { format, limit: minFixes === 2 ? "two" : String(minFixes) });
  }
  return { kind: "read", name, format, title, fixes, rawSegments, notes: sink.notes.list() };
}
