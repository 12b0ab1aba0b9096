import type { Config } from "tailwindcss";

/** The tokens of the log sheet; their values per theme are custom properties in app/globals.css. */
const config: Config = {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}", "./lib/display/**/*.ts"],
  theme: {
    extend: {
      colors: {
        paper: "var(--paper)",
        sheet: "var(--sheet)",
        ink: "var(--ink)",
        muted: "var(--muted)",
        hairline: "var(--hairline)",
        kelp: "var(--kelp)",
        shell: "var(--shell)",
        buoy: "var(--buoy)",
        "buoy-text": "var(--buoy-text)",
        swell: "var(--swell)",
        water: "var(--water)",
        land: "var(--land)",
      },
      fontFamily: {
        sans: ["var(--sans)"],
        mono: ["var(--mono)"],
      },
      borderRadius: { none: "0" },
    },
  },
};
export default config;
