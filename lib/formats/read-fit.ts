import { Decoder, Stream, type RecordMesg } from "@garmin/fitsdk";
import type { FixConverter } from "./fix-draft";
import { FitWalker } from "./fit-records";
import { FixSink } from "./fix-sink";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import type { TrackRead } from "./track-read";

/** Seconds from 1970 to the FIT epoch 1989-12-31T00:00:00Z. Source: FIT Protocol, date_time. */
const FIT_EPOCH_S = 631_065_600;
/** Smaller values count from power-up, the clock was not set. Source: FIT Profile, date_time. */
const CLOCK_SET_S = 0x10000000;
const SEMICIRCLE_DEG = 180 / 2 ** 31;

const noText: FixConverter = () => ({ coordinates: [] });

function numberOf(value: unknown): number {
  return typeof value === "number" ? value : Number.NaN;
}

/** One decoded record to the sink; fields that the device marked as not known are absent and become NaN. */
function takeRecord(sink: FixSink, record: RecordMesg): void {
  const seconds = numberOf(record.timestamp);
  const altitude = numberOf(record.enhancedAltitude);
  const speed = numberOf(record.enhancedSpeed);
  sink.commitNumbers({
    timeMs: seconds < CLOCK_SET_S ? 0 : (seconds + FIT_EPOCH_S) * 1000,
    latDeg: numberOf(record.positionLat) * SEMICIRCLE_DEG,
    lonDeg: numberOf(record.positionLong) * SEMICIRCLE_DEG,
    elevationM: Number.isNaN(altitude) ? numberOf(record.altitude) : altitude,
    receiverSpeedMps: Number.isNaN(speed) ? numberOf(record.speed) : speed,
    heartRateBpm: numberOf(record.heartRate),
  });
}

function decodePiece(sink: FixSink, piece: Uint8Array): void {
  const decoder = new Decoder(Stream.fromByteArray(piece));
  const { messages } = decoder.read({
    dataOnly: true,
    expandSubFields: false,
    expandComponents: false,
    mergeHeartRates: false,
    convertTypesToStrings: false,
    convertDateTimesToDates: false,
  });
  for (const record of messages.recordMesgs ?? []) takeRecord(sink, record);
}

/**
 * A FIT activity to a track: the device maker's decoder reads the records (position, time, height, heart
 * rate, speed), nothing else of the file is decoded or kept, serial numbers least of all.
 *
 * Shapes: `bytes` is the whole file, bounded by the caller; several joined files give one segment each.
 * Units: semicircles to degrees, FIT seconds to epoch milliseconds. Errors: ParseError `broken_fit`,
 * `no_track`, `too_many_fixes`. A file that ends in the middle keeps its whole records, with a note.
 * Source: FIT Protocol and Profile 21.217.
 */
export function readFit(bytes: Uint8Array, budget: ReadBudget): TrackRead {
  const sink = new FixSink(noText, budget);
  let records = 0;
  let segments = 0;
  const walker = new FitWalker(bytes, (piece) => {
    budget.spendBytes(0);
    records++;
    decodePiece(sink, piece);
  });
  const { whole, files } = walker.walk(() => {
    const before = sink.count;
    sink.startSegment();
    if (segments === 0 || before > 0) segments++;
  });
  if (!whole) sink.notes.add("cut_short");
  else if (files === 1 && !new Decoder(Stream.fromByteArray(bytes)).checkIntegrity())
    sink.notes.add("checksum");
  if (sink.count === 0 && (!whole || files === 0)) throw refusal("broken_fit", { format: "fit" });
  if (records === 0) {
    throw refusal("no_track", {
      format: "fit",
      found: "The FIT file holds no recorded track (perhaps a workout or settings)",
    });
  }
  return {
    format: "fit",
    title: null,
    sink,
    rawSegments: segments,
    whyEmpty: () =>
      refusal(sink.notes.count("clock_not_set") > 0 ? "no_times" : "no_track", {
        format: "fit",
        found:
          sink.notes.count("clock_not_set") > 0
            ? "The clock of the device was never set: its dates are impossible"
            : "The FIT file was recorded without positions",
      }),
  };
}
