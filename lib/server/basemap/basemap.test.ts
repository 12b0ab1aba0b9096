import { mkdir, mkdtemp, rm, utimes, writeFile } from "node:fs/promises";
import os from "node:os";
import path from "node:path";
import { gzipSync } from "node:zlib";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";

const settings = vi.hoisted(() => ({ dataDir: "", mapStyleUrl: null as string | null }));
vi.mock("@/lib/server/env/env", () => ({ env: () => settings }));

import { AppError } from "@/lib/errors/app-error";
import { basemapArchivePath, basemapProgressPath } from "./archive-path";
import { readLandTile } from "./read-tile";
import { basemapStatus } from "./status";
import { basemapStyle } from "./style";
import { tileResponse } from "./tile-response";

/**
 * An archive of one tile (zoom 1, column 1, row 0) by hand from the PMTiles version 3 specification (Protomaps,
 * 2023): header of 127 bytes, then root directory, metadata, tile data. On the Hilbert curve of zoom 1 the
 * tiles run (0,0), (0,1), (1,1), (1,0) after the one of zoom 0, so its id is 4.
 */
function oneTile(body: string): Buffer {
  const tile = gzipSync(body);
  const root = gzipSync(Buffer.from([1, 4, 1, tile.length, 1]));
  const meta = gzipSync("{}");
  const header = Buffer.alloc(127);
  header.write("PMTiles\x03", "latin1");
  const leaf = 127 + root.length + meta.length;
  [127, root.length, 127 + root.length, meta.length, leaf, 0, leaf, tile.length, 1, 1, 1].forEach(
    (value, i) => header.writeBigUInt64LE(BigInt(value), 8 + 8 * i),
  );
  header.set([1, 2, 2, 1, 0, 1], 96);
  return Buffer.concat([header, root, meta, tile]);
}

beforeAll(async () => {
  settings.dataDir = await mkdtemp(path.join(os.tmpdir(), "basemap-"));
  await mkdir(path.dirname(basemapArchivePath(settings.dataDir)), { recursive: true });
});
afterAll(() => rm(settings.dataDir, { recursive: true, force: true }));

const request = (headers: Record<string, string> = {}) => new Request("http://localhost/tile", { headers });

describe("before the coastline is there", () => {
  it("says so, and how far its preparation is", async () => {
    expect(await basemapStatus(Date.now())).toEqual({ state: "missing" });
    await writeFile(basemapProgressPath(settings.dataDir), "123 0.250\n");
    expect(await basemapStatus(Date.now())).toEqual({ state: "preparing", share: 0.25 });
  });

  it("takes a build that has said nothing for long as dead", async () => {
    const hourAgo = Date.now() / 1000 - 3600;
    await utimes(basemapProgressPath(settings.dataDir), hourAgo, hourAgo);
    expect(await basemapStatus(Date.now())).toEqual({ state: "missing" });
    await rm(basemapProgressPath(settings.dataDir));
  });

  it("has a style of water alone and no tile", async () => {
    const style = basemapStyle("dark", { state: "missing" });
    expect(style["sources"]).toEqual({});
    await expect(readLandTile({ stamp: "0".repeat(16), z: "0", x: "0", y: "0" })).rejects.toThrow(AppError);
  });
});

describe("once it is there", () => {
  let stamp = "";
  beforeAll(async () => {
    await writeFile(basemapArchivePath(settings.dataDir), oneTile("land"));
    const status = await basemapStatus(Date.now());
    stamp = status.state === "ready" ? status.stamp : "";
  });

  it("is found without a restart, and the style points at its tiles", async () => {
    expect(stamp).toMatch(/^[0-9a-f]{16}$/);
    const style = JSON.stringify(basemapStyle("light", { state: "ready", stamp, maxZoom: 1 }));
    expect(style).toContain(`/api/map/tiles/${stamp}/{z}/{x}/{y}`);
    expect(style).toContain("OpenStreetMap contributors, ODbL");
    // No other server: the page's policy and a beach without a network both forbid it.
    expect(style).not.toMatch(/https?:/);
  });

  it("sends a tile unpacked, to keep for ever under this stamp", async () => {
    const answer = tileResponse(request(), await readLandTile({ stamp, z: "1", x: "1", y: "0" }));
    expect(answer.status).toBe(200);
    expect(await answer.text()).toBe("land");
    expect(answer.headers.get("content-type")).toBe("application/vnd.mapbox-vector-tile");
    expect(answer.headers.get("cache-control")).toContain("immutable");
  });

  it("answers 304 to a browser that has it, by entity tag, in a list or weakly", async () => {
    const tile = await readLandTile({ stamp, z: "1", x: "1", y: "0" });
    for (const known of [tile.etag, `"other", ${tile.etag}`, `W/${tile.etag}`, "*"]) {
      const answer = tileResponse(request({ "if-none-match": known }), tile);
      expect([known, answer.status, await answer.text()]).toEqual([known, 304, ""]);
    }
    expect(tileResponse(request({ "if-none-match": '"other"' }), tile).status).toBe(200);
  });

  it("answers 204 for open sea", async () => {
    for (const [x, y] of [
      ["0", "0"],
      ["0", "1"],
      ["1", "1"],
    ] as const) {
      // prettier-ignore
      const answer = tileResponse(request(), await readLandTile({ stamp, z: "1", x, y }));
      expect(answer.status).toBe(204);
    }
  });

  it("serves an older archive's address for now only", async () => {
    const old = await readLandTile({ stamp: "0123456789abcdef", z: "1", x: "1", y: "0" });
    expect(tileResponse(request(), old).headers.get("cache-control")).not.toContain("immutable");
  });

  it.each([
    { z: "2", x: "0", y: "0" },
    { z: "1", x: "2", y: "0" },
    { z: "-1", x: "0", y: "0" },
    { z: "1", x: "0", y: "1e0" },
    { z: "1", x: "../..", y: "0" },
    { z: "99", x: "0", y: "0" },
  ])("has no tile $z/$x/$y", async (place) => {
    await expect(readLandTile({ stamp, ...place })).rejects.toThrow("no such map tile");
  });

  it("gives way to the operator's own style", async () => {
    settings.mapStyleUrl = "https://maps.example/style.json";
    expect(await basemapStatus(Date.now())).toEqual({
      state: "external",
      styleUrl: "https://maps.example/style.json",
    });
    settings.mapStyleUrl = null;
  });

  it("refuses a theme that does not exist", () => {
    expect(() => basemapStyle("pink", { state: "missing" })).toThrow("light or dark");
  });
});
