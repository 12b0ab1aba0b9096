import { createHash } from "node:crypto";
import { open, type FileHandle } from "node:fs/promises";
import { promisify } from "node:util";
import { gunzip } from "node:zlib";
import { bytesToHeader, zxyToTileId } from "pmtiles";
import { at } from "@/lib/errors/invariant";

const HEADER_BYTES = 127;
const GZIP = 2;
const gunzipAsync = promisify(gunzip);

/** The directory of an archive as columns, ascending by tile id. */
type Directory = {
  readonly tileIds: Float64Array;
  readonly runLengths: Uint32Array;
  readonly lengths: Uint32Array;
  readonly offsets: Float64Array;
};

/** An open archive of vector tiles. */
export type Archive = {
  /** Changes whenever the archive's content does; safe in a URL. */
  readonly stamp: string;
  readonly maxZoom: number;
  readonly addressedTiles: number;
  /** The tile's bytes, unpacked, or null when the archive has nothing there (open sea). */
  readTile(z: number, x: number, y: number): Promise<Uint8Array<ArrayBuffer> | null>;
  close(): Promise<void>;
};

/**
 * Opens an archive of the open PMTiles format, version 3, with gzip inside, and keeps its whole directory
 * (half a megabyte for the world's land), so that a tile costs one positioned read.
 *
 * @throws Error with code ENOENT when there is no such file; Error when it is not such an archive.
 */
export async function openArchive(file: string): Promise<Archive> {
  const handle = await open(file, "r");
  try {
    const head = await readExactly(handle, 0, HEADER_BYTES);
    if (head.toString("latin1", 0, 7) !== "PMTiles")
      throw new Error(`${file} is not an archive of map tiles.`);
    const header = bytesToHeader(new Uint8Array(head).buffer);
    if (header.internalCompression !== GZIP || header.tileCompression !== GZIP) {
      throw new Error(`${file} is not packed with gzip.`);
    }
    const root = await readDirectory(handle, header.rootDirectoryOffset, header.rootDirectoryLength);
    const directory = await flatten(handle, root, header.leafDirectoryOffset);
    const { size } = await handle.stat();
    return {
      stamp: createHash("sha256").update(head).update(String(size)).digest("hex").slice(0, 16),
      maxZoom: header.maxZoom,
      addressedTiles: header.numAddressedTiles,
      async readTile(z, x, y) {
        if (z > header.maxZoom) return null;
        const place = find(directory, zxyToTileId(z, x, y));
        if (place === -1) return null;
        const offset = header.tileDataOffset + at(directory.offsets, place);
        return gunzipAsync(await readExactly(handle, offset, at(directory.lengths, place)));
      },
      close: () => handle.close(),
    };
  } catch (error) {
    await handle.close();
    throw error;
  }
}

async function readExactly(handle: FileHandle, position: number, length: number): Promise<Buffer> {
  const buffer = Buffer.allocUnsafe(length);
  let filled = 0;
  while (filled < length) {
    const { bytesRead } = await handle.read(buffer, filled, length - filled, position + filled);
    if (bytesRead === 0) throw new Error("The archive of map tiles is cut short.");
    filled += bytesRead;
  }
  return buffer;
}

async function readDirectory(handle: FileHandle, position: number, length: number): Promise<Directory> {
  return parseDirectory(await gunzipAsync(await readExactly(handle, position, length)));
}

/** Root and leaves as one directory; an entry of run length 0 points at a leaf. */
async function flatten(handle: FileHandle, root: Directory, leafOffset: number): Promise<Directory> {
  const parts: Directory[] = [];
  for (let i = 0; i < root.tileIds.length; i += 1) {
    const isLeaf = at(root.runLengths, i) === 0;
    parts.push(
      isLeaf
        ? await readDirectory(handle, leafOffset + at(root.offsets, i), at(root.lengths, i))
        : slice(root, i, i + 1),
    );
  }
  const count = parts.reduce((sum, part) => sum + part.tileIds.length, 0);
  const whole = emptyDirectory(count);
  let filled = 0;
  for (const part of parts) {
    whole.tileIds.set(part.tileIds, filled);
    whole.runLengths.set(part.runLengths, filled);
    whole.lengths.set(part.lengths, filled);
    whole.offsets.set(part.offsets, filled);
    filled += part.tileIds.length;
  }
  return whole;
}

function emptyDirectory(count: number): Directory {
  return {
    tileIds: new Float64Array(count),
    runLengths: new Uint32Array(count),
    lengths: new Uint32Array(count),
    offsets: new Float64Array(count),
  };
}

function slice(directory: Directory, start: number, end: number): Directory {
  return {
    tileIds: directory.tileIds.subarray(start, end),
    runLengths: directory.runLengths.subarray(start, end),
    lengths: directory.lengths.subarray(start, end),
    offsets: directory.offsets.subarray(start, end),
  };
}

function parseDirectory(bytes: Uint8Array): Directory {
  let position = 0;
  const varint = (): number => {
    let value = 0;
    for (let scale = 1; ; scale *= 128) {
      const byte = at(bytes, position);
      position += 1;
      value += (byte % 128) * scale;
      if (byte < 128) return value;
    }
  };
  const count = varint();
  const directory = emptyDirectory(count);
  let id = 0;
  for (let i = 0; i < count; i += 1) directory.tileIds[i] = id += varint();
  for (let i = 0; i < count; i += 1) directory.runLengths[i] = varint();
  for (let i = 0; i < count; i += 1) directory.lengths[i] = varint();
  for (let i = 0; i < count; i += 1) {
    const value = varint();
    // Nought: right after the one before. Otherwise the offset plus one.
    directory.offsets[i] =
      value === 0 && i > 0 ? at(directory.offsets, i - 1) + at(directory.lengths, i - 1) : value - 1;
  }
  return directory;
}

/** The entry whose run covers a tile id, or -1. */
function find(directory: Directory, tileId: number): number {
  let low = 0;
  let high = directory.tileIds.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    if (at(directory.tileIds, middle) <= tileId) low = middle + 1;
    else high = middle - 1;
  }
  if (high < 0) return -1;
  return tileId < at(directory.tileIds, high) + at(directory.runLengths, high) ? high : -1;
}
