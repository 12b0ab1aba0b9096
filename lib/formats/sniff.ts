import { isFitHeader } from "./fit-records";
import { TextDecoding } from "./text-decoding";

/** What a file is by its bytes; its name never counts. `found` completes the sentence of a refusal. */
export type Sniffed =
  | { readonly kind: "empty" | "gzip" | "zip" | "fit" | "xml" }
  | { readonly kind: "other"; readonly found: string };

const LOOK_CHARACTERS = 1024;

/** Marks at the start of other files. Source: the formats' own documents (JPEG, PNG, PDF, RAR, 7z, xz, bzip2, SQLite). */
const MARKS: readonly (readonly [readonly number[], string])[] = [
  [[0xff, 0xd8, 0xff], "It holds a photo (JPEG), not a track"],
  [[0x89, 0x50, 0x4e, 0x47], "It holds a picture (PNG), not a track"],
  [[0x47, 0x49, 0x46, 0x38], "It holds a picture (GIF), not a track"],
  [[0x25, 0x50, 0x44, 0x46], "It holds a PDF document, not a track"],
  [[0x52, 0x61, 0x72, 0x21], "It holds a RAR archive, which is not read here"],
  [[0x37, 0x7a, 0xbc, 0xaf], "It holds a 7z archive, which is not read here"],
  [[0xfd, 0x37, 0x7a, 0x58], "It holds an xz archive, which is not read here"],
  [[0x42, 0x5a, 0x68], "It holds a bzip2 archive, which is not read here"],
  [[0x53, 0x51, 0x4c, 0x69, 0x74, 0x65], "It holds a database, not a track"],
];

function startsWith(bytes: Uint8Array, mark: readonly number[]): boolean {
  return mark.every((byte, index) => bytes[index] === byte);
}

function otherText(text: string): string {
  if (/^[{[]/.test(text)) return "It holds JSON data, not a track in a format that is read here";
  if (/^\$G[A-Z]{4},/.test(text)) return "It holds a receiver log (NMEA), which is not read here";
  const head = text.slice(0, 256);
  const odd = head.replaceAll(/[\p{L}\p{N}\p{P}\p{S}\s]/gu, "").length;
  if (head.length < 16 && odd === 0) return "It holds a few characters only, not a track";
  return odd > head.length / 20
    ? "It holds bytes of an unknown kind, not a track"
    : "It holds plain text, not a track";
}

/**
 * What the first bytes of a file show it to be.
 *
 * Domain: `head` is the whole file or at least its first 64 KiB; `whole` says which. Errors: none.
 * Source: RFC 1952 (gzip mark), PKWARE APPNOTE 4.3 (zip marks), FIT Protocol (header).
 *
 * @example
 * sniff(new Uint8Array([0x1f, 0x8b, 8]), true).kind; // "gzip"
 */
export function sniff(head: Uint8Array, whole: boolean): Sniffed {
  if (head.length === 0) return { kind: "empty" };
  if (startsWith(head, [0x1f, 0x8b])) return { kind: "gzip" };
  if (startsWith(head, [0x50, 0x4b, 3, 4]) || startsWith(head, [0x50, 0x4b, 5, 6])) return { kind: "zip" };
  if (isFitHeader(head)) return { kind: "fit" };
  for (const [mark, found] of MARKS) if (startsWith(head, mark)) return { kind: "other", found };
  const decoding = new TextDecoding(head);
  const text = (decoding.decode(head.subarray(0, 4 * LOOK_CHARACTERS)) + decoding.end()).trimStart();
  if (text === "") return { kind: whole ? "empty" : "xml" };
  return text.startsWith("<") ? { kind: "xml" } : { kind: "other", found: otherText(text) };
}
