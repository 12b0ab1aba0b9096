function luminance(hex: string): number {
  const [r = NaN, g = NaN, b = NaN] = [1, 3, 5].map((start) => {
    const channel = Number.parseInt(hex.slice(start, start + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

/**
 * Contrast ratio of two colours, 1 (none) to 21 (black on white). Colours are "#rrggbb"; anything else gives NaN.
 * Source: W3C, Web Content Accessibility Guidelines 2.2 (2023), definitions of relative luminance (sRGB per
 * IEC 61966-2-1, threshold 0.04045) and contrast ratio.
 *
 * @example
 * contrastRatio("#000000", "#ffffff"); // 21
 */
export function contrastRatio(one: string, other: string): number {
  const [a, b] = [luminance(one), luminance(other)];
  return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
}
