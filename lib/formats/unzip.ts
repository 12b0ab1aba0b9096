import { Buffer, isUtf8 } from "node:buffer";
import { fromBuffer, type Entry, type ZipFile } from "yauzl";
import { refusal } from "./refusal";

const ENTRIES_LOOKED_AT_MAX = 5000;
const NAME_LENGTH_MAX = 200;

/** A file of a zip: its name, made harmless, and its unpacked bytes when asked for. */
export type ZipMember = {
  readonly name: string;
  readonly locked: boolean;
  readonly open: () => AsyncGenerator<Uint8Array>;
};

/**
 * A file name to show: no control characters, no drive, no leading slash, no "..", at most 200 characters.
 *
 * @example
 * harmlessName("../../etc/passwd"); // "etc/passwd"
 */
export function harmlessName(raw: string): string {
  const parts = raw
    .replaceAll(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, "")
    .split(/[\\/]+/)
    .filter((part) => part !== "" && part !== "." && part !== ".." && !/^[A-Za-z]:$/.test(part));
  const name = Array.from(parts.join("/")).slice(-NAME_LENGTH_MAX).join("");
  return name === "" ? "file" : name;
}

function rawName(entry: Entry): string {
  // Names come as bytes (decodeStrings: false): a hostile one must not make the whole zip unreadable.
  const bytes: unknown = entry.fileName;
  if (!Buffer.isBuffer(bytes)) return String(bytes);
  return isUtf8(bytes) ? bytes.toString("utf8") : bytes.toString("latin1");
}

/** Folders, the side files of one maker's packer, and hidden files are no uploads. */
function isNoFile(name: string): boolean {
  return /[\\/]$/.test(name) || name.split(/[\\/]/).some((part) => /^(__MACOSX$|\.(?!\.?$))/.test(part));
}

function openZip(bytes: Uint8Array): Promise<ZipFile> {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.length);
  return new Promise((resolve, reject) => {
    fromBuffer(buffer, { lazyEntries: true, decodeStrings: false }, (error, zip) => {
      if (error === null || error === undefined) resolve(zip);
      else reject(refusal("broken_archive", { format: "zip", cause: error }));
    });
  });
}

async function* unpacked(zip: ZipFile, entry: Entry): AsyncGenerator<Uint8Array> {
  try {
    const stream = await new Promise<AsyncIterable<Uint8Array>>((resolve, reject) => {
      zip.openReadStream(entry, (error, opened) => {
        if (error === null || error === undefined) resolve(opened as AsyncIterable<Uint8Array>);
        else reject(error);
      });
    });
    yield* stream;
  } catch (error) {
    throw refusal("broken_archive", { format: "zip", cause: error });
  }
}

/**
 * The files of a zip, folders, hidden files and packers' side files left out; nothing is unpacked yet.
 *
 * Shapes: `bytes` is the whole zip. Errors: ParseError `broken_archive`, and `too_many_files` past
 * `filesMax`. Source: PKWARE APPNOTE.TXT 6.3.
 */
export async function zipMembers(bytes: Uint8Array, filesMax: number): Promise<ZipMember[]> {
  const zip = await openZip(bytes);
  const members: ZipMember[] = [];
  let looked = 0;
  return new Promise((resolve, reject) => {
    zip.on("error", (cause: unknown) => reject(refusal("broken_archive", { format: "zip", cause })));
    zip.on("end", () => resolve(members));
    zip.on("entry", (entry: Entry) => {
      const name = rawName(entry);
      if (!isNoFile(name)) {
        const locked = entry.isEncrypted();
        members.push({ name: harmlessName(name), locked, open: () => unpacked(zip, entry) });
      }
      if (members.length > filesMax || ++looked > ENTRIES_LOOKED_AT_MAX) {
        reject(refusal("too_many_files", { format: "zip", limit: String(filesMax) }));
      } else zip.readEntry();
    });
    zip.readEntry();
  });
}
