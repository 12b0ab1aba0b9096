import { createReadStream } from "node:fs";
import { performance } from "node:perf_hooks";
import type { MessagePort } from "node:worker_threads";
import { gzipSync } from "node:zlib";
import { analysePrepared } from "@/lib/analysis/analyse-prepared";
import type { Analysis } from "@/lib/analysis/analysis";
import { readFile, type FileRead, type ReadOutcome } from "@/lib/formats/read-file";
import { harmlessName } from "@/lib/formats/unzip";
import { SPAN_LIMIT_MS } from "@/lib/track/believable-fixes";
import { encodeSeries } from "@/lib/track/series-blob";
import { prepareTrack } from "@/lib/track/prepare-track";
import type { Fixes } from "@/lib/track/fixes";
import type { SpeedSeries } from "@/lib/track/speed-series";
import { timeZoneAt } from "@/lib/track/time-zone";
import type { AnalysisProgress, AnalysisTask, Position, TrackOutcome, WorkerMessage } from "./analysis-task";
import { guessDiscipline } from "./guess-discipline";

/** Reading alone is given up before the pool ends the whole worker. */
const READ_TIME_MS = 30_000;

/** The pool calls this in a worker thread: one file in, one outcome for each track in it. */
export default async function analyseFile({ task, progress }: WorkerMessage): Promise<TrackOutcome[]> {
  const say = (step: AnalysisProgress) => {
    progress.postMessage(step);
  };
  try {
    say({ step: "reading" });
    const read = await readFile(createReadStream(task.path, { highWaterMark: 256 * 1024 }), {
      fileName: task.fileName,
      limits: { timeMs: READ_TIME_MS },
      nowMs: () => performance.now(),
    });
    const named = withEntryNames(read, task.fileName);
    const wanted =
      task.entryName === null ? named : named.filter(({ entryName }) => entryName === task.entryName);
    return wanted.map(({ entryName, outcome }, index) => {
      say({ step: "analysing", done: index, total: wanted.length });
      return outcome.kind === "refused"
        ? { kind: "refused", entryName, code: outcome.error.code, text: outcome.error.message }
        : analysed(entryName, outcome, task);
    });
  } finally {
    (progress satisfies MessagePort).close();
  }
}

/** A plain file's track has no entry name; in an archive every track has its own, also when two files are called the same. */
function withEntryNames(outcomes: ReadOutcome[], fileName: string) {
  const seen = new Map<string, number>();
  return outcomes.map((outcome) => {
    if (outcomes.length === 1 && outcome.name === harmlessName(fileName)) return { entryName: "", outcome };
    const before = seen.get(outcome.name) ?? 0;
    seen.set(outcome.name, before + 1);
    return { entryName: before === 0 ? outcome.name : `${outcome.name} (${before + 1})`, outcome };
  });
}

function analysed(entryName: string, read: FileRead, task: AnalysisTask): TrackOutcome {
  const spanMs = middleSpanMs(read.fixes);
  if (spanMs > SPAN_LIMIT_MS) {
    const days = Math.round(spanMs / 86_400_000).toLocaleString("en");
    return {
      kind: "refused",
      entryName,
      code: "no_track",
      text: `The recording spans ${days} days, more than one outing can last. Export the outings one by one and upload those.`,
    };
  }
  const prepared = prepareTrack(read.fixes, { trim: task.trim });
  const discipline = task.discipline ?? guessDiscipline(prepared);
  const analysis = analysePrepared(prepared, {
    discipline,
    trim: task.trim,
    minimumFlyingSpeedMps: task.minimumFlyingSpeedMps,
  });
  if (analysis.series.count === 0) {
    return {
      kind: "refused",
      entryName,
      code: "too_few_fixes",
      text: "Nothing usable is left of the track once impossible fixes are dropped, so no speed can be worked out. Check that it is the whole recording.",
    };
  }
  const from = positionAt(analysis.series, analysis.window.startMs);
  return {
    kind: "read",
    entryName,
    format: read.format,
    discipline,
    timeZone: timeZoneAt(from.latDeg, from.lonDeg),
    from,
    to: positionAt(analysis.series, analysis.window.endMs),
    series: gzipSync(encodeSeries(analysis.series), { level: 6 }),
    ...listsOf(analysis),
    quality: { ...analysis.quality, notes: [...read.notes, ...analysis.quality.notes] },
  };
}

/** Time from the early to the late fixes, a twentieth at either end aside: a clock that was not set yet is no long recording. */
function middleSpanMs({ timeMs }: Fixes): number {
  const sorted = Float64Array.from(timeMs).sort();
  const early = sorted[Math.floor(0.05 * (sorted.length - 1))] ?? 0;
  const late = sorted[Math.ceil(0.95 * (sorted.length - 1))] ?? 0;
  return late - early;
}

function listsOf(analysis: Analysis) {
  return {
    segments: analysis.segments.map(rounded),
    bumpRides: analysis.bumpRides.map(rounded),
    lulls: analysis.lulls.map(rounded),
    figures: analysis.figures,
    window: analysis.window,
    firstFixMs: analysis.firstFixMs,
    lastFixMs: analysis.lastFixMs,
    version: analysis.version,
  };
}

/** Thousandths of a millisecond, metre or m/s: the precision in which the page gets the lists, so both agree. */
function rounded<T extends object>(item: T): T {
  return Object.fromEntries(
    Object.entries(item).map(([key, value]: [string, unknown]) => [
      key,
      typeof value === "number" ? Math.round(value * 1000) / 1000 : value,
    ]),
  ) as T;
}

function positionAt(series: SpeedSeries, timeMs: number): Position {
  const index = Math.min(
    series.count - 1,
    Math.max(0, Math.round((timeMs - series.startMs) / series.stepMs)),
  );
  return { latDeg: series.latDeg[index] ?? NaN, lonDeg: series.lonDeg[index] ?? NaN };
}
