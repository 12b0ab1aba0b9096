import { createHash } from "node:crypto";
import { open, rename, rm } from "node:fs/promises";
import path from "node:path";
import { gzipSync } from "node:zlib";
import { zxyToTileId } from "pmtiles";
import { at } from "@/lib/errors/invariant";

/** A run of tiles with the same bytes: `runLength` ids from `tileId` on; `offset` from the start of tile data. */
export type Entry = { tileId: number; offset: number; length: number; runLength: number };

const HEADER_BYTES = 127;
/** The format wants header and root directory in the first 16 KiB. */
const ROOT_BYTES_MAX = 16_384 - HEADER_BYTES;
const GZIP = 2;
const VECTOR_TILES = 1;

/**
 * Collects tiles and writes them as one archive of the open PMTiles format, version 3
 * (source: Protomaps, PMTiles version 3 specification, 2023). Equal tiles are kept once; tiles stand in
 * the order of their ids, so what is near on the map is near in the file.
 */
export class ArchiveWriter {
  private readonly contentByHash = new Map<string, number>();
  private readonly contents: Buffer[] = [];
  private readonly tiles: { tileId: number; content: number }[] = [];
  private maxZoom = 0;

  add(z: number, x: number, y: number, data: Uint8Array): void {
    const hash = createHash("sha1").update(data).digest("base64");
    let content = this.contentByHash.get(hash);
    if (content === undefined) {
      content = this.contents.push(gzipSync(data, { level: 7 })) - 1;
      this.contentByHash.set(hash, content);
    }
    this.tiles.push({ tileId: zxyToTileId(z, x, y), content });
    this.maxZoom = Math.max(this.maxZoom, z);
  }

  get tileCount(): number {
    return this.tiles.length;
  }

  get contentCount(): number {
    return this.contents.length;
  }

  /**
   * Writes beside the target and renames when every byte is on the disk, so that the target is always whole.
   * Returns the archive's length in bytes.
   */
  async write(target: string, metadata: Readonly<Record<string, unknown>>): Promise<number> {
    const { entries, order, dataBytes } = this.layOut();
    const { root, leaves } = directories(entries);
    const meta = gzipSync(Buffer.from(JSON.stringify(metadata)));
    const header = this.header(
      { root: root.length, meta: meta.length, leaves: leaves.length, data: dataBytes },
      entries.length,
    );
    const temporary = `${target}.${process.pid}.part`;
    const file = await open(temporary, "w", 0o644);
    let bytes = 0;
    try {
      for (const part of [
        header,
        root,
        meta,
        leaves,
        ...order.map((content) => at(this.contents, content)),
      ]) {
        await file.write(part);
        bytes += part.length;
      }
      await file.sync();
    } catch (error) {
      await rm(temporary, { force: true });
      throw error;
    } finally {
      await file.close();
    }
    await rename(temporary, target);
    const folder = await open(path.dirname(target), "r");
    await folder.sync();
    await folder.close();
    return bytes;
  }

  private layOut(): { entries: Entry[]; order: number[]; dataBytes: number } {
    const entries: Entry[] = [];
    const order: number[] = [];
    const placed = new Map<number, number>();
    let dataBytes = 0;
    let lastContent = -1;
    for (const tile of [...this.tiles].sort((a, b) => a.tileId - b.tileId)) {
      const last = entries.at(-1);
      if (last && tile.content === lastContent && tile.tileId === last.tileId + last.runLength) {
        last.runLength += 1;
        continue;
      }
      const length = at(this.contents, tile.content).length;
      let offset = placed.get(tile.content);
      if (offset === undefined) {
        offset = dataBytes;
        placed.set(tile.content, offset);
        order.push(tile.content);
        dataBytes += length;
      }
      entries.push({ tileId: tile.tileId, offset, length, runLength: 1 });
      lastContent = tile.content;
    }
    return { entries, order, dataBytes };
  }

  private header(
    bytes: { root: number; meta: number; leaves: number; data: number },
    entryCount: number,
  ): Buffer {
    const header = Buffer.alloc(HEADER_BYTES);
    header.write("PMTiles", 0, "latin1");
    header.writeUInt8(3, 7);
    const numbers = [HEADER_BYTES, bytes.root, HEADER_BYTES + bytes.root, bytes.meta];
    const leafOffset = HEADER_BYTES + bytes.root + bytes.meta;
    numbers.push(leafOffset, bytes.leaves, leafOffset + bytes.leaves, bytes.data);
    numbers.push(this.tiles.length, entryCount, this.contents.length);
    numbers.forEach((value, index) => header.writeBigUInt64LE(BigInt(value), 8 + 8 * index));
    header.writeUInt8(1, 96);
    header.writeUInt8(GZIP, 97);
    header.writeUInt8(GZIP, 98);
    header.writeUInt8(VECTOR_TILES, 99);
    header.writeUInt8(0, 100);
    header.writeUInt8(this.maxZoom, 101);
    const corners = [-180, -85.0511287, 180, 85.0511287];
    corners.forEach((degrees, index) => header.writeInt32LE(Math.round(degrees * 1e7), 102 + 4 * index));
    return header;
  }
}

/** One root directory when it fits the first 16 KiB, else a root of leaves, each of as many entries as needed. */
function directories(entries: readonly Entry[]): { root: Buffer; leaves: Buffer } {
  const single = serializeEntries(entries);
  if (single.length <= ROOT_BYTES_MAX) return { root: single, leaves: Buffer.alloc(0) };
  for (let leafSize = 4096; ; leafSize *= 2) {
    const leaves: Buffer[] = [];
    const rootEntries: Entry[] = [];
    let offset = 0;
    for (let i = 0; i < entries.length; i += leafSize) {
      const leaf = serializeEntries(entries.slice(i, i + leafSize));
      rootEntries.push({ tileId: at(entries, i).tileId, offset, length: leaf.length, runLength: 0 });
      leaves.push(leaf);
      offset += leaf.length;
    }
    const root = serializeEntries(rootEntries);
    if (root.length <= ROOT_BYTES_MAX) return { root, leaves: Buffer.concat(leaves) };
  }
}

function serializeEntries(entries: readonly Entry[]): Buffer {
  const bytes: number[] = [];
  writeVarint(bytes, entries.length);
  let lastId = 0;
  for (const entry of entries) {
    writeVarint(bytes, entry.tileId - lastId);
    lastId = entry.tileId;
  }
  for (const entry of entries) writeVarint(bytes, entry.runLength);
  for (const entry of entries) writeVarint(bytes, entry.length);
  let end = -1;
  for (const entry of entries) {
    // Nought means "right after the one before"; any other offset is written plus one.
    writeVarint(bytes, entry.offset === end ? 0 : entry.offset + 1);
    end = entry.offset + entry.length;
  }
  return gzipSync(Buffer.from(bytes), { level: 9 });
}

function writeVarint(bytes: number[], value: number): void {
  let rest = value;
  while (rest >= 128) {
    bytes.push((rest % 128) + 128);
    rest = Math.floor(rest / 128);
  }
  bytes.push(rest);
}
