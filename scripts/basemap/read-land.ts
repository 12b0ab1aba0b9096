import { createReadStream } from "node:fs";

/**
 * Polygons as flat columns: positions are lon, lat pairs in degrees; ring `i` spans positions
 * `ringStarts[i]` to `ringStarts[i + 1]` (last = first); polygon `p` spans rings `polygonStarts[p]` to
 * `polygonStarts[p + 1]`, the first of them its outline and the others its holes.
 */
export type LandRings = {
  readonly lonLat: Float64Array;
  readonly ringStarts: Uint32Array;
  readonly polygonStarts: Uint32Array;
};

class Column<T extends Float64Array | Uint32Array> {
  private values: T;
  private readonly create: (length: number) => T;
  length = 0;
  constructor(create: (length: number) => T, capacity: number) {
    this.create = create;
    this.values = create(capacity);
  }
  push(value: number): void {
    if (this.length === this.values.length) {
      const wider = this.create(Math.ceil(this.values.length * 1.5));
      wider.set(this.values);
      this.values = wider;
    }
    this.values[this.length++] = value;
  }
  done(): T {
    return this.values.subarray(0, this.length) as T;
  }
}

const QUOTE = 0x22;
const BACKSLASH = 0x5c;
const OPEN = 0x5b;
const CLOSE = 0x5d;
const COMMA = 0x2c;
const MINUS = 0x2d;
const POINT = 0x2e;
const ZERO = 0x30;
const NINE = 0x39;
const KEY = "coordinates";
const POWERS = Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));

/**
 * Reads the rings of every Polygon and MultiPolygon of a GeoJSON text that arrives in pieces, without ever
 * holding the text or its objects: only the arrays under "coordinates" are looked at, and their own nesting
 * tells positions, rings and polygons apart. An array of positions is a ring, an array of rings a polygon.
 */
export class LandReader {
  private readonly lonLat = new Column((length) => new Float64Array(length), 1 << 20);
  private readonly ringStarts = new Column((length) => new Uint32Array(length), 1 << 16);
  private readonly polygonStarts = new Column((length) => new Uint32Array(length), 1 << 14);
  /** What the array at each depth has held so far: 1 numbers, 2 positions, 3 rings, 4 polygons. */
  private readonly held: number[] = [];
  private inString = false;
  private escaped = false;
  private text = "";
  private lastText = "";
  private numbersInPosition = 0;
  private digits = 0;
  private mantissa = 0;
  private decimals = -1;
  private negative = false;

  push(chunk: Uint8Array): void {
    for (let i = 0; i < chunk.length; i += 1) {
      const byte = chunk[i] ?? 0;
      if (this.inString) this.readString(byte);
      else if (this.held.length > 0) this.readCoordinates(byte);
      else if (byte === QUOTE) {
        this.inString = true;
        this.text = "";
      } else if (byte === OPEN && this.lastText === KEY) this.held.push(0);
    }
  }

  finish(): LandRings {
    if (this.held.length > 0 || this.inString)
      throw new Error("The land file ends in the middle of a shape.");
    if (this.polygonStarts.length === 0) throw new Error("The land file holds no polygons.");
    this.ringStarts.push(this.lonLat.length / 2);
    this.polygonStarts.push(this.ringStarts.length - 1);
    return {
      lonLat: this.lonLat.done(),
      ringStarts: this.ringStarts.done(),
      polygonStarts: this.polygonStarts.done(),
    };
  }

  private readString(byte: number): void {
    if (this.escaped) this.escaped = false;
    else if (byte === BACKSLASH) this.escaped = true;
    else if (byte === QUOTE) {
      this.inString = false;
      this.lastText = this.text;
    } else if (this.text.length < KEY.length + 1) this.text += String.fromCharCode(byte);
  }

  private readCoordinates(byte: number): void {
    if (byte >= ZERO && byte <= NINE) {
      this.mantissa = this.mantissa * 10 + (byte - ZERO);
      this.digits += 1;
      if (this.decimals >= 0) this.decimals += 1;
    } else if (byte === POINT) this.decimals = 0;
    else if (byte === MINUS) this.negative = true;
    else if (byte === COMMA) this.endNumber();
    else if (byte === OPEN) this.open();
    else if (byte === CLOSE) this.close();
    else if (byte > 0x20) {
      throw new Error(
        `The land file has an unexpected "${String.fromCharCode(byte)}" among its coordinates.`,
      );
    }
  }

  private open(): void {
    // Starts are written when a ring's or polygon's first position is known to belong to it.
    this.held.push(0);
    this.numbersInPosition = 0;
  }

  private endNumber(): void {
    if (this.digits === 0) return;
    // Exact: both the digits (under 2^53) and the power of ten are represented exactly, so one rounding.
    if (this.digits > 15) throw new Error("The land file has a coordinate of more than 15 digits.");
    const size = this.mantissa / (POWERS[Math.max(0, this.decimals)] ?? 1);
    if (this.numbersInPosition < 2) this.lonLat.push(this.negative ? -size : size);
    this.numbersInPosition += 1;
    this.held[this.held.length - 1] = 1;
    this.digits = 0;
    this.mantissa = 0;
    this.decimals = -1;
    this.negative = false;
  }

  private ringBegin = 0;
  private ringsBegin = 0;

  private close(): void {
    this.endNumber();
    const kind = this.held.pop() ?? 0;
    if (kind === 1 && this.numbersInPosition < 2) {
      throw new Error("The land file has a position with one number.");
    }
    if (kind === 2) {
      this.ringStarts.push(this.ringBegin);
      this.ringBegin = this.lonLat.length / 2;
    } else if (kind === 3) {
      this.polygonStarts.push(this.ringsBegin);
      this.ringsBegin = this.ringStarts.length;
    }
    if (this.held.length > 0 && kind > 0) this.held[this.held.length - 1] = kind + 1;
    if (this.held.length === 0) this.lastText = "";
  }
}

/** Reads a whole GeoJSON file of land in one pass; see `LandReader`. */
export async function readLand(path: string): Promise<LandRings> {
  const reader = new LandReader();
  for await (const chunk of createReadStream(path, { highWaterMark: 1 << 20 })) reader.push(chunk as Buffer);
  return reader.finish();
}
