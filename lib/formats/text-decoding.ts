import { Buffer, isAscii, isUtf8 } from "node:buffer";

const DECLARATION = /^<\?xml[^>]{0,200}?encoding\s*=\s*["']([A-Za-z0-9._-]{1,40})["']/;

const NOTHING = new Uint8Array(0);
const HELD_BACK_MAX = 4096;

type Wide = "utf-16le" | "utf-16be";

/** UTF-16 by its byte order mark, or by the zero byte beside the first ASCII character. */
function wideEncoding(head: Uint8Array): Wide | null {
  const [first, second] = [head[0], head[1]];
  if (first === 0xff && second === 0xfe) return "utf-16le";
  if (first === 0xfe && second === 0xff) return "utf-16be";
  if (head.length < 4 || first === undefined || second === undefined) return null;
  if (first !== 0 && second === 0 && head[3] === 0) return "utf-16le";
  if (first === 0 && second !== 0 && head[2] === 0) return "utf-16be";
  return null;
}

/** The 8-bit encoding to fall back on when the bytes are not UTF-8: the declared one, else Windows-1252. */
function narrowDecoder(head: Uint8Array): TextDecoder {
  const text = Buffer.from(head.buffer, head.byteOffset, Math.min(head.length, 300)).toString("latin1");
  const label = DECLARATION.exec(text.trimStart())?.[1]?.toLowerCase() ?? "windows-1252";
  const usable = label.startsWith("utf-16") || label === "utf-8" || label === "utf8" ? "windows-1252" : label;
  try {
    return new TextDecoder(usable);
  } catch {
    return new TextDecoder("windows-1252");
  }
}

/**
 * Where to cut a piece: before its last "<" when that is near the end, so that the tokenizer gets whole tags
 * and its text is one flat string; otherwise before a UTF-8 character that is not whole yet.
 */
function cutPlace(bytes: Uint8Array): number {
  const tag = bytes.lastIndexOf(0x3c);
  return tag > 0 && bytes.length - tag < HELD_BACK_MAX ? tag : bytes.length - openTail(bytes);
}

function utf8Text(bytes: Uint8Array): string {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.length);
  // Most tracks are plain ASCII, which is a copy instead of a conversion.
  return buffer.toString(isAscii(buffer) ? "latin1" : "utf8");
}

/** How many bytes at the end belong to a UTF-8 character that is not whole yet: 0 to 3. */
function openTail(bytes: Uint8Array): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back++) {
    const byte = bytes[bytes.length - back] ?? 0;
    if (byte < 0x80) return 0;
    if (byte >= 0xc0) return (byte >= 0xf0 ? 4 : byte >= 0xe0 ? 3 : 2) > back ? back : 0;
  }
  return 0;
}

/**
 * Bytes of an XML file to text, piece by piece, whatever the file says about itself.
 *
 * UTF-16 is known by its mark or its zero bytes. Otherwise the bytes are UTF-8 as long as they can be; the
 * first piece that cannot be switches to the declared 8-bit encoding, or to Windows-1252 (a superset of
 * Latin-1) when none or a wrong one is declared. A byte order mark is stripped.
 * Shapes: `decode(bytes)` returns the text that is whole so far, `end()` the rest. `repaired` tells that a
 * declaration did not fit the bytes. Errors: none, bytes that mean nothing become U+FFFD.
 * Source: XML 1.0 (5th ed.), appendix F (detection of encodings).
 *
 * @example
 * new TextDecoding(new Uint8Array([0x3c, 0x61, 0x3e])).decode(new Uint8Array([0x3c, 0x61, 0x3e])); // "<a>"
 */
export class TextDecoding {
  repaired = false;
  private readonly wide: TextDecoder | null;
  private readonly narrow: TextDecoder;
  private readonly declaresUtf8: boolean;
  private utf8 = true;
  private tail: Uint8Array = NOTHING;
  private atStart = true;

  constructor(head: Uint8Array) {
    const wide = wideEncoding(head);
    this.wide = wide === null ? null : new TextDecoder(wide);
    this.narrow = narrowDecoder(head);
    this.declaresUtf8 = this.narrow.encoding === "windows-1252" && !/8859-1|1252/.test(headText(head));
  }

  decode(bytes: Uint8Array): string {
    const text = this.wide === null ? this.decodeNarrow(bytes) : this.wide.decode(bytes, { stream: true });
    if (!this.atStart || text === "") return text;
    this.atStart = false;
    return text.charCodeAt(0) === 0xfeff ? text.slice(1) : text;
  }

  end(): string {
    if (this.wide !== null) return this.wide.decode();
    const rest = this.tail;
    this.tail = NOTHING;
    if (rest.length === 0) return "";
    return isUtf8(rest) ? utf8Text(rest) : this.narrow.decode(rest);
  }

  private decodeNarrow(bytes: Uint8Array): string {
    if (!this.utf8) return this.narrow.decode(bytes, { stream: true });
    const joined = this.tail.length === 0 ? bytes : Buffer.concat([this.tail, bytes]);
    const cut = cutPlace(joined);
    const whole = joined.subarray(0, cut);
    if (isUtf8(whole)) {
      this.tail = cut === joined.length ? NOTHING : joined.slice(cut);
      return utf8Text(whole);
    }
    this.utf8 = false;
    this.repaired = this.declaresUtf8;
    this.tail = NOTHING;
    return this.narrow.decode(joined, { stream: true });
  }
}

function headText(head: Uint8Array): string {
  return Buffer.from(head.buffer, head.byteOffset, Math.min(head.length, 300)).toString("latin1");
}
