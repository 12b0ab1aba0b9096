import { ParseError } from "@/lib/errors/parse-error";

const BASE = 128;
const LOW_BITS = 0x7f;
const MORE = 0x80;

/** A growing byte buffer that whole numbers are appended to, seven bits a byte, least significant first. */
export class VarintWriter {
  private bytes = new Uint8Array(1024);
  private used = 0;

  /** Appends one byte, 0 to 255. */
  byte(value: number): void {
    if (this.used === this.bytes.length) {
      const larger = new Uint8Array(this.bytes.length * 2);
      larger.set(this.bytes);
      this.bytes = larger;
    }
    this.bytes[this.used] = value;
    this.used += 1;
  }

  /** Appends a whole number from 0 to 2^53 - 1. */
  unsigned(value: number): void {
    let rest = value;
    while (rest >= BASE) {
      const quotient = Math.floor(rest / BASE);
      this.byte((rest - quotient * BASE) | MORE);
      rest = quotient;
    }
    this.byte(rest);
  }

  /** Appends a whole number of either sign: 0, -1, 1, -2 ... become 0, 1, 2, 3 ... (zigzag). */
  signed(value: number): void {
    this.unsigned(value < 0 ? -2 * value - 1 : 2 * value);
  }

  /** Appends an IEEE 754 double, eight bytes, little endian. */
  double(value: number): void {
    const view = new DataView(new ArrayBuffer(8));
    view.setFloat64(0, value, true);
    for (let i = 0; i < 8; i += 1) this.byte(view.getUint8(i));
  }

  /** What was written so far. */
  done(): Uint8Array {
    return this.bytes.slice(0, this.used);
  }
}

/**
 * Reads back what `VarintWriter` wrote, in the same order. Every method throws ParseError `not_well_formed` where the bytes end
 * too early or hold a number past 2^53 - 1.
 */
export class VarintReader {
  private at = 0;

  constructor(private readonly bytes: Uint8Array) {}

  /** One byte, 0 to 255. */
  byte(): number {
    const value = this.bytes[this.at];
    if (value === undefined) throw this.broken("ends too early");
    this.at += 1;
    return value;
  }

  /** A whole number from 0 to 2^53 - 1. */
  unsigned(): number {
    let value = 0;
    let scale = 1;
    for (;;) {
      const next = this.byte();
      value += (next & LOW_BITS) * scale;
      if (value > Number.MAX_SAFE_INTEGER) throw this.broken("holds a number that is too large");
      if (next < MORE) return value;
      scale *= BASE;
      if (scale > Number.MAX_SAFE_INTEGER) throw this.broken("holds a number that is too long");
    }
  }

  /** A whole number of either sign. */
  signed(): number {
    const value = this.unsigned();
    return value % 2 === 1 ? -(value + 1) / 2 : value / 2;
  }

  /** An IEEE 754 double. */
  double(): number {
    const view = new DataView(new ArrayBuffer(8));
    for (let i = 0; i < 8; i += 1) view.setUint8(i, this.byte());
    return view.getFloat64(0, true);
  }

  /** Bytes not read yet. */
  get left(): number {
    return this.bytes.length - this.at;
  }

  /** The error for bytes that are not what was written; `what` completes "The stored track ...". */
  broken(what: string): ParseError {
    return new ParseError("not_well_formed", `The stored track ${what}.`, {
      format: "series",
      place: `byte ${this.at}`,
    });
  }
}
