import type { LandTileAnswer } from "./read-tile";

const FOR_EVER = "public, max-age=31536000, immutable";
/** An address with an older archive's stamp answers with today's tile, but not for long. */
const FOR_NOW = "public, max-age=60";

/**
 * A tile as HTTP: 304 when the browser has it, 204 for open sea, else its bytes (RFC 9110, 13.1.2, 15.3.5).
 * The bytes go out unpacked: the framework drops the content-encoding of a route's answer, and packed
 * bytes without that header are unreadable. Packing would save a quarter of a few kilobytes.
 */
export function tileResponse(request: Request, tile: LandTileAnswer): Response {
  const headers = new Headers({
    "cache-control": tile.current ? FOR_EVER : FOR_NOW,
    etag: tile.etag,
    "x-content-type-options": "nosniff",
  });
  if (matches(request.headers.get("if-none-match"), tile.etag)) {
    return new Response(null, { status: 304, headers });
  }
  if (tile.data === null) return new Response(null, { status: 204, headers });
  headers.set("content-type", "application/vnd.mapbox-vector-tile");
  return new Response(tile.data, { status: 200, headers });
}

/** Weak comparison against a list or a star. */
function matches(ifNoneMatch: string | null, etag: string): boolean {
  if (ifNoneMatch === null) return false;
  return ifNoneMatch.split(",").some((part) => {
    const candidate = part.trim().replace(/^W\//, "");
    return candidate === "*" || candidate === etag;
  });
}
