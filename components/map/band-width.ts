import { SPEED_BANDS } from "@/lib/display/speed-ramp";

/** Width of a band's line, pixels: faster is also wider, so that speed can be read without colour. */
export function bandWidthPx(band: number): number {
  return 2.5 + (2.5 * band) / (SPEED_BANDS - 1);
}
