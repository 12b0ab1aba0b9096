import { Readable } from "node:stream";
import { constants, createGunzip } from "node:zlib";
import { refusal } from "./refusal";

const OUTPUT_BYTES = 256 * 1024;

/**
 * Unpacks gzip as it streams by, in pieces of at most 256 KiB, so that whoever reads can stop a bomb.
 *
 * A file that was cut short gives what is there; bytes behind the end are ignored.
 * Errors: ParseError `broken_archive` when the packed bytes are damaged; errors of the source pass through.
 * Source: RFC 1952.
 */
export async function* gunzip(pieces: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  const packed = Readable.from(pieces);
  const unpacked = createGunzip({ chunkSize: OUTPUT_BYTES, finishFlush: constants.Z_SYNC_FLUSH });
  packed.on("error", (error) => unpacked.destroy(error));
  packed.pipe(unpacked);
  try {
    for await (const piece of unpacked) yield piece as Uint8Array;
  } catch (error) {
    const code = error instanceof Error && "code" in error ? String(error.code) : "";
    throw code.startsWith("Z_") ? refusal("broken_archive", { format: "gzip", cause: error }) : error;
  } finally {
    packed.destroy();
    unpacked.destroy();
  }
}
