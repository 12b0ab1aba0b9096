import type { MessagePort } from "node:worker_threads";
import type { BumpRide, Discipline, Figures, Lull, OnFoilSegment } from "@/lib/analysis/analysis";
import type { ParseErrorCode } from "@/lib/errors/parse-error";
import type { QualityReport } from "@/lib/track/quality";
import type { Stretch } from "@/lib/track/speed-series";

/** One file to read and analyse. */
export type AnalysisTask = {
  readonly path: string;
  readonly fileName: string;
  /** Null: guessed from the shape of the track. */
  readonly discipline: Discipline | null;
  readonly trim: Stretch | null;
  readonly minimumFlyingSpeedMps: number | null;
  /** Of an archive, the one entry wanted, or null for all. */
  readonly entryName: string | null;
};

/** What the worker gets: the task and where to say how far it is. */
export type WorkerMessage = { readonly task: AnalysisTask; readonly progress: MessagePort };

/** reading: bytes to fixes. analysing: fixes to figures, `done` of `total` tracks of the file are through. */
export type AnalysisProgress =
  | { readonly step: "reading" }
  | { readonly step: "analysing"; readonly done: number; readonly total: number };

export type RefusedTrack = {
  readonly kind: "refused";
  /** Name of the entry in an archive, empty for a plain file. */
  readonly entryName: string;
  readonly code: ParseErrorCode;
  readonly text: string;
};

export type Position = { readonly latDeg: number; readonly lonDeg: number };

/** One track, analysed and packed as it is stored. Units as in lib/analysis. */
export type AnalysedFile = {
  readonly kind: "read";
  readonly entryName: string;
  readonly format: string;
  readonly discipline: Discipline;
  readonly timeZone: string;
  /** Where the window begins and ends. */
  readonly from: Position;
  readonly to: Position;
  /** Blob of the speed series, gzip-compressed. */
  readonly series: Uint8Array;
  readonly segments: readonly OnFoilSegment[];
  readonly bumpRides: readonly BumpRide[];
  readonly lulls: readonly Lull[];
  /** Its notes begin with what the reader left out or repaired. */
  readonly quality: QualityReport;
  readonly figures: Figures;
  readonly window: Stretch;
  readonly firstFixMs: number;
  readonly lastFixMs: number;
  readonly version: number;
};

export type TrackOutcome = AnalysedFile | RefusedTrack;
