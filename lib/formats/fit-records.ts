/** The global number of the `record` message. Source: FIT Profile, message 20. */
const RECORD = 20;
const TIMESTAMP = 253;
const FIELDS_MAX = 255;
/** Wanted fields of a record and their one right size in bytes. Source: FIT Profile, record message. */
const WANTED: ReadonlyMap<number, number> = new Map([
  [TIMESTAMP, 4],
  [0, 4],
  [1, 4],
  [2, 2],
  [3, 1],
  [6, 2],
  [73, 4],
  [78, 4],
]);
const PIECE_RECORDS = 512;

type Copy = { readonly from: number; readonly size: number };
type Definition = {
  readonly size: number;
  readonly littleEndian: boolean;
  /** Where the message's own timestamp stands, -1 when it has none. */
  readonly timestampAt: number;
  /** For records: what is copied and the definition that describes the copy. */
  readonly copies: readonly Copy[] | null;
  readonly header: readonly number[];
};

/** How far a FIT file could be walked. `whole` is false when it ends in the middle or has a broken message. */
export type FitWalk = { readonly whole: boolean; readonly files: number };

/**
 * Walks a FIT file and hands on its `record` messages only, cut down to position, time, height, heart rate
 * and speed, in pieces that the device maker's decoder can read on their own (definition, records, room for a
 * checksum). So memory is bounded by one piece, and what a file says about its owner and device (serial
 * numbers, name, weight) is never decoded at all. Compressed time stamps, which that decoder refuses, are
 * written out in full.
 *
 * Shapes: `onPiece` gets the bytes of a piece; `onFile` is told of each of several files joined into one.
 * Errors: none, a broken message ends the walk. Source: FIT Protocol (D00001275), "File structure",
 * "Compressed timestamp header".
 */
export class FitWalker {
  private readonly bytes: Uint8Array;
  private readonly onPiece: (piece: Uint8Array) => void;
  private definitions: (Definition | undefined)[] = [];
  private piece: number[] = [];
  private pieceRecords = 0;
  private pieceDefinition: Definition | null = null;
  private lastTimestamp = 0;

  constructor(bytes: Uint8Array, onPiece: (piece: Uint8Array) => void) {
    this.bytes = bytes;
    this.onPiece = onPiece;
  }

  walk(onFile: () => void): FitWalk {
    let at = 0;
    let files = 0;
    let whole = true;
    while (whole && at < this.bytes.length) {
      const headerSize = this.bytes[at] ?? 0;
      if (!isFitHeader(this.bytes.subarray(at))) return { whole: false, files };
      const stated = this.uint(at + 4, 4, true);
      const end = at + headerSize + stated;
      // A device that lost power leaves the size at zero: walk what is there.
      whole = stated > 0 && end + 2 <= this.bytes.length;
      onFile();
      files++;
      this.definitions = [];
      const stop = whole ? end : this.bytes.length;
      if (this.walkMessages(at + headerSize, stop) < stop) whole = false;
      this.flush();
      at = end + 2;
    }
    return { whole, files };
  }

  private uint(at: number, size: number, littleEndian: boolean): number {
    let value = 0;
    for (let index = 0; index < size; index++) {
      value = value * 256 + (this.bytes[littleEndian ? at + size - 1 - index : at + index] ?? 0);
    }
    return value;
  }

  private walkMessages(from: number, end: number): number {
    let at = from;
    while (at < end) {
      const header = this.bytes[at] ?? 0;
      const next =
        (header & 0x80) !== 0
          ? this.data(at, end, { local: (header >> 5) & 3, offset: header & 31 })
          : (header & 0x40) !== 0
            ? this.define(at, end, (header & 0x20) !== 0)
            : this.data(at, end, { local: header & 15, offset: -1 });
      if (next < 0) return at;
      at = next;
    }
    return at;
  }

  private define(at: number, end: number, hasDeveloper: boolean): number {
    const local = (this.bytes[at] ?? 0) & 15;
    const littleEndian = this.bytes[at + 2] === 0;
    const global = this.uint(at + 3, 2, littleEndian);
    const fields = Math.min(this.bytes[at + 5] ?? 0, FIELDS_MAX);
    let next = at + 6;
    let size = 0;
    let timestampAt = -1;
    const copies: Copy[] = [];
    const triples: number[] = [];
    for (let field = 0; field < fields; field++, next += 3) {
      const [number = 0, bytes = 0, type = 0] = this.bytes.subarray(next, next + 3);
      if (number === TIMESTAMP && bytes === 4) timestampAt = size;
      if (WANTED.get(number) === bytes) {
        copies.push({ from: size, size: bytes });
        triples.push(number, bytes, type);
      }
      size += bytes;
    }
    if (hasDeveloper) {
      const developerFields = this.bytes[next++] ?? 0;
      for (let field = 0; field < developerFields; field++, next += 3) size += this.bytes[next + 1] ?? 0;
    }
    if (next > end) return -1;
    if (timestampAt < 0) triples.push(TIMESTAMP, 4, 0x86);
    const order = littleEndian ? 0 : 1;
    const globalBytes = littleEndian ? [RECORD, 0] : [0, RECORD];
    this.definitions[local] = {
      size,
      littleEndian,
      timestampAt,
      copies: global === RECORD ? copies : null,
      header: [0x40, 0, order, ...globalBytes, triples.length / 3, ...triples],
    };
    return next;
  }

  private data(at: number, end: number, header: { local: number; offset: number }): number {
    const definition = this.definitions[header.local];
    if (definition === undefined || at + 1 + definition.size > end) return -1;
    const body = at + 1;
    if (header.offset >= 0) {
      const rolled = header.offset < this.lastTimestamp % 32 ? 32 : 0;
      this.lastTimestamp += header.offset - (this.lastTimestamp % 32) + rolled;
    } else if (definition.timestampAt >= 0) {
      this.lastTimestamp = this.uint(body + definition.timestampAt, 4, definition.littleEndian);
    }
    if (definition.copies !== null) this.copyRecord(definition, definition.copies, body);
    return body + definition.size;
  }

  private copyRecord(definition: Definition, copies: readonly Copy[], body: number): void {
    if (this.pieceDefinition !== definition || this.pieceRecords >= PIECE_RECORDS) {
      this.flush();
      this.pieceDefinition = definition;
      this.piece.push(...definition.header);
    }
    this.piece.push(0);
    for (const { from, size } of copies) {
      for (let index = 0; index < size; index++) this.piece.push(this.bytes[body + from + index] ?? 0);
    }
    if (definition.timestampAt < 0) {
      for (let index = 0; index < 4; index++) {
        const shift = 8 * (definition.littleEndian ? index : 3 - index);
        this.piece.push((this.lastTimestamp >>> shift) & 0xff);
      }
    }
    this.pieceRecords++;
  }

  private flush(): void {
    if (this.pieceRecords > 0) this.onPiece(Uint8Array.from([...this.piece, 0, 0]));
    this.piece = [];
    this.pieceRecords = 0;
    this.pieceDefinition = null;
  }
}

/**
 * Whether bytes begin with the header of a FIT file (12 or 14 bytes, ".FIT" at byte 8).
 *
 * @example
 * isFitHeader(new Uint8Array(14)); // false
 */
export function isFitHeader(bytes: Uint8Array): boolean {
  const size = bytes[0];
  const marked = bytes[8] === 0x2e && bytes[9] === 0x46 && bytes[10] === 0x49 && bytes[11] === 0x54;
  return (size === 12 || size === 14) && marked;
}
