import { isBusy, type ImportResult, type UploadItem, type UploadState } from "./upload-item";

/** Sending one file: how it went, and a way to stop it. */
export type Sending = {
  readonly result: Promise<SendResult>;
  readonly stop: () => void;
};
export type SendResult =
  | { readonly ok: true; readonly uploadId: string }
  | {
      readonly ok: false;
      readonly message: string;
      readonly again: boolean;
      readonly signedOut: boolean;
    };

export type UploadWork = {
  readonly send: (file: File, onShare: (share: number) => void) => Sending;
  readonly importFile: (uploadId: string, setupId: string | null) => Promise<ImportResult>;
};

export type QueueLimits = {
  readonly sendingAtOnce: number;
  readonly bytesMax: number;
  readonly filesMax: number;
};

type Entry = { item: UploadItem; readonly turn: number; file: File | null; stop: (() => void) | null };

/**
 * The files of one visit on their way: sent two at a time, read one after the other. It lives outside of React, so that walking to
 * another page of the app and back neither stops nor forgets anything.
 */
export class UploadQueue {
  private entries: Entry[] = [];
  private snapshot: readonly UploadItem[] = [];
  private readonly listeners = new Set<() => void>();
  private made = 0;
  private setupId: string | null = null;

  constructor(
    private readonly work: UploadWork,
    private readonly limits: QueueLimits,
  ) {}

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  readonly items = (): readonly UploadItem[] => this.snapshot;

  /** The setup that sessions are tagged with from now on. */
  ride(setupId: string | null): void {
    this.setupId = setupId;
  }

  /** Every session of the list carries the given tag now. */
  tagged(setupId: string | null): void {
    for (const entry of this.entries) entry.item = { ...entry.item, setupId };
    this.changed();
  }

  /** Takes files in; gives back how many were left out because there are too many under way. */
  add(files: readonly File[]): number {
    const open = this.entries.filter(({ item }) => isBusy([item])).length;
    const taken = files.slice(0, Math.max(0, this.limits.filesMax - open));
    this.entries = [...taken.map((file) => this.newEntry(file)), ...this.entries];
    this.changed();
    this.next();
    return files.length - taken.length;
  }

  /** Files that an earlier visit sent and nobody read. */
  addStored(uploads: readonly { uploadId: string; fileName: string; sizeBytes: number }[]): void {
    const known = new Set(this.entries.map(({ item }) => item.uploadId));
    for (const { uploadId, fileName, sizeBytes } of uploads) {
      if (known.has(uploadId)) continue;
      const turn = this.newTurn();
      const item: UploadItem = {
        key: `file-${turn}`,
        name: fileName,
        sizeBytes,
        uploadId,
        setupId: null,
        state: { step: "stored" },
      };
      this.entries.push({ item, turn, file: null, stop: null });
    }
    this.changed();
    this.next();
  }

  stop(key: string): void {
    const entry = this.find(key);
    if (entry === undefined) return;
    const { step } = entry.item.state;
    if (step !== "waiting" && step !== "sending") return;
    entry.stop?.();
    this.set(entry, { step: "stopped" });
    this.next();
  }

  retry(key: string): void {
    const entry = this.find(key);
    if (entry === undefined || isBusy([entry.item])) return;
    this.set(entry, { step: entry.item.uploadId === null ? "waiting" : "stored" });
    this.next();
  }

  /** Asks again about a file that is stored: after its session was brought back. */
  readAgain(key: string): void {
    const entry = this.find(key);
    if (entry === undefined || entry.item.uploadId === null) return;
    this.set(entry, { step: "stored" });
    this.next();
  }

  private newTurn(): number {
    this.made += 1;
    return this.made;
  }

  private newEntry(file: File): Entry {
    const { name, size } = file;
    const turn = this.newTurn();
    const item = { key: `file-${turn}`, name, sizeBytes: size, uploadId: null, setupId: null };
    return { item: { ...item, state: this.firstState(size) }, turn, file, stop: null };
  }

  private firstState(sizeBytes: number): UploadState {
    const failed = (text: string): UploadState => ({ step: "failed", text, again: false, signedOut: false });
    if (sizeBytes === 0) return failed("The file is empty. Export it again from the watch or the phone.");
    if (sizeBytes <= this.limits.bytesMax) return { step: "waiting" };
    const most = `${Math.round(this.limits.bytesMax / 1_000_000)} MB`;
    return failed(
      `The file is larger than ${most}, the most one file may have. Split the recording, or send it gzip-compressed.`,
    );
  }

  private find(key: string): Entry | undefined {
    return this.entries.find(({ item }) => item.key === key);
  }

  private set(entry: Entry, state: UploadState, uploadId = entry.item.uploadId): void {
    entry.item = { ...entry.item, state, uploadId };
    this.changed();
  }

  private changed(): void {
    this.snapshot = this.entries.map(({ item }) => item);
    for (const listener of this.listeners) listener();
  }

  private inTurn(step: UploadState["step"]): Entry[] {
    return this.entries.filter(({ item }) => item.state.step === step).sort((a, b) => a.turn - b.turn);
  }

  /** Starts what may start now, first come first served. */
  private next(): void {
    const room = this.limits.sendingAtOnce - this.inTurn("sending").length;
    for (const entry of this.inTurn("waiting").slice(0, Math.max(0, room))) void this.send(entry);
    const stored = this.inTurn("stored")[0];
    if (stored !== undefined && this.inTurn("reading").length === 0) void this.read(stored);
  }

  private async send(entry: Entry): Promise<void> {
    const { file } = entry;
    if (file === null) return;
    this.set(entry, { step: "sending", share: 0 });
    const sending = this.work.send(file, (share) => {
      if (entry.item.state.step === "sending") this.set(entry, { step: "sending", share });
    });
    entry.stop = sending.stop;
    const result = await sending.result;
    // Stopped meanwhile (and perhaps sent again since): this answer is nobody's.
    if (entry.stop !== sending.stop || entry.item.state.step !== "sending") return;
    entry.stop = null;
    if (result.ok) this.set(entry, { step: "stored" }, result.uploadId);
    else {
      const { message: text, again, signedOut } = result;
      this.set(entry, { step: "failed", text, again, signedOut });
    }
    this.next();
  }

  private async read(entry: Entry): Promise<void> {
    const { uploadId } = entry.item;
    if (uploadId === null) return;
    const { setupId } = this;
    entry.item = { ...entry.item, setupId };
    this.set(entry, { step: "reading" });
    const result = await this.work.importFile(uploadId, setupId).catch((): ImportResult => ({
      ok: false,
      message: "The connection broke while the file was read. It is safe on the server; try again.",
      signedOut: false,
    }));
    if (result.ok) this.set(entry, { step: "done", verdicts: result.verdicts });
    else {
      const { message: text, signedOut } = result;
      this.set(entry, { step: "failed", text, again: true, signedOut });
    }
    this.next();
  }
}
