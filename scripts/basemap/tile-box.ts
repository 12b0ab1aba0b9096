import type { Box } from "./clip-ring";

/** Longitude, degrees, of the west side of column `x` of `2^z` in Web Mercator. */
export function lonOfColumn(x: number, z: number): number {
  return (x / 2 ** z) * 360 - 180;
}

/** Latitude, degrees, of the north side of row `y` of `2^z`. Source: OGC 17-083r4 (WebMercatorQuad). */
export function latOfRow(y: number, z: number): number {
  return (Math.atan(Math.sinh(Math.PI * (1 - (2 * y) / 2 ** z))) * 180) / Math.PI;
}

/** Column and row (with fractions) of a position among the `2^z` of a zoom. */
export function columnRowOf(lonDeg: number, latDeg: number, z: number): { x: number; y: number } {
  const sin = Math.sin((latDeg * Math.PI) / 180);
  return {
    x: ((lonDeg + 180) / 360) * 2 ** z,
    y: (0.5 - Math.log((1 + sin) / (1 - sin)) / (4 * Math.PI)) * 2 ** z,
  };
}

/** A tile's box in degrees, widened on every side by `margin` of its width. */
export function tileBox(z: number, x: number, y: number, margin: number): Box {
  return {
    west: lonOfColumn(x - margin, z),
    east: lonOfColumn(x + 1 + margin, z),
    north: latOfRow(y - margin, z),
    south: latOfRow(y + 1 + margin, z),
  };
}
