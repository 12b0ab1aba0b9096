import localFont from "next/font/local";

/*
 * Each cut is two files, Latin and Latin extended, split by unicode-range so that the second is fetched only
 * by pages that need it (place and rider names). No generated fallback: it would stand before the extended
 * file in the family list and hide it. The font loader accepts literals only, hence the repetition.
 */
const archivo = localFont({
  src: "../fonts/archivo-latin-standard-normal.woff2",
  variable: "--font-archivo-latin",
  weight: "100 900",
  display: "swap",
  adjustFontFallback: false,
  declarations: [
    { prop: "font-stretch", value: "62% 125%" },
    {
      prop: "unicode-range",
      value:
        "U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+0304,U+0308,U+0329,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD",
    },
  ],
});

const archivoExtended = localFont({
  src: "../fonts/archivo-latin-ext-standard-normal.woff2",
  variable: "--font-archivo-extended",
  weight: "100 900",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    { prop: "font-stretch", value: "62% 125%" },
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

const splineMono = localFont({
  src: [
    { path: "../fonts/spline-sans-mono-latin-400-normal.woff2", weight: "400", style: "normal" },
    { path: "../fonts/spline-sans-mono-latin-600-normal.woff2", weight: "600", style: "normal" },
  ],
  variable: "--font-spline-latin",
  display: "swap",
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0000-00FF,U+0131,U+0152-0153,U+02BB-02BC,U+02C6,U+02DA,U+02DC,U+0304,U+0308,U+0329,U+2000-206F,U+20AC,U+2122,U+2191,U+2193,U+2212,U+2215,U+FEFF,U+FFFD",
    },
  ],
});

const splineMonoExtended = localFont({
  src: [
    { path: "../fonts/spline-sans-mono-latin-ext-400-normal.woff2", weight: "400", style: "normal" },
    { path: "../fonts/spline-sans-mono-latin-ext-600-normal.woff2", weight: "600", style: "normal" },
  ],
  variable: "--font-spline-extended",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [
    {
      prop: "unicode-range",
      value:
        "U+0100-02BA,U+02BD-02C5,U+02C7-02CC,U+02CE-02D7,U+02DD-02FF,U+1D00-1DBF,U+1E00-1E9F,U+1EF2-1EFF,U+2020,U+20A0-20AB,U+20AD-20C0,U+2113,U+2C60-2C7F,U+A720-A7FF",
    },
  ],
});

/** Class names that define the font custom properties on the root element. */
export const fontVariables = [archivo, archivoExtended, splineMono, splineMonoExtended]
  .map((font) => font.variable)
  .join(" ");
