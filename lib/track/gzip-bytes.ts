import { gunzipSync, gzipSync } from "fflate";
import { ParseError } from "@/lib/errors/parse-error";

/**
 * Bytes packed with gzip (RFC 1952), the same on server and in browser.
 *
 * @example
 * gunzipBytes(gzipBytes(new Uint8Array([7, 7, 7]))).length; // 3
 */
export function gzipBytes(bytes: Uint8Array): Uint8Array {
  return gzipSync(bytes, { level: 6, mtime: 0 });
}

/**
 * Whether bytes begin as gzip does. Source: RFC 1952, section 2.3.1.
 *
 * @example
 * isGzip(new Uint8Array([31, 139, 8])); // true
 */
export function isGzip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x1f && bytes[1] === 0x8b;
}

/**
 * Bytes unpacked again; for our own stored data, not for files of strangers (there is no bound on the result).
 *
 * @throws ParseError `not_well_formed` when they are not whole.
 */
export function gunzipBytes(bytes: Uint8Array): Uint8Array {
  try {
    return gunzipSync(bytes);
  } catch (cause) {
    throw new ParseError("not_well_formed", "The stored track cannot be unpacked.", {
      format: "gzip",
      cause,
    });
  }
}
