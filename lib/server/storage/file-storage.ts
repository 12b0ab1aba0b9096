import type { Readable } from "node:stream";

/** An incoming file that is whole and safe on this machine, waiting to be kept or thrown away. */
export type ReceivedFile = {
  readonly sha256: string;
  readonly sizeBytes: number;
  /** Where the bytes wait; gone after `keep` or `discard`. */
  readonly temporaryPath: string;
};

export type ReceiveLimits = {
  readonly bytesMax: number;
  /** Give up when nothing arrives for this long. */
  readonly idleMs: number;
  /** What the sender said it would send, or null. */
  readonly declaredBytes: number | null;
};

/**
 * Where raw files live, by the SHA-256 of their bytes. The folder on disk is one; a bucket can be another: nothing outside this
 * interface knows paths, only `localCopy` gives one, for readers that need a file on this machine.
 */
export type FileStorage = {
  /**
   * Takes a stream to a temporary place while it counts and hashes. Whatever ends it early, nothing is left behind.
   *
   * @throws UploadRefusedError with the reason in words.
   */
  readonly receive: (body: ReadableStream<Uint8Array> | null, limits: ReceiveLimits) => Promise<ReceivedFile>;
  /** Moves a received file to its place for good: after this resolves the bytes outlive a power cut. */
  readonly keep: (file: ReceivedFile) => Promise<void>;
  /** Throws a received file away. */
  readonly discard: (file: ReceivedFile) => Promise<void>;
  readonly has: (sha256: string) => Promise<boolean>;
  /** @throws AppError `internal` when the bytes are not there. */
  readonly openRead: (sha256: string) => Promise<{ stream: Readable; sizeBytes: number }>;
  /** A path on this machine to read the file from; call `release` when done. */
  readonly localCopy: (sha256: string) => Promise<{ path: string; release: () => Promise<void> }>;
  readonly remove: (sha256: string) => Promise<void>;
  /** Every kept file that was written before the given time. */
  readonly listOlderThan: (timeMs: number) => AsyncIterable<string>;
  /** Bytes the disk has left, or null when the store has no such end. */
  readonly freeBytes: () => Promise<number | null>;
  /** Removes what interrupted uploads left in the temporary place before the given time. Gives back how many. */
  readonly clearTemporary: (olderThanMs: number) => Promise<number>;
};
