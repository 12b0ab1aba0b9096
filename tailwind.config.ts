import type { Config } from "tailwindcss";

/** The tokens of the log sheet; their values per theme are custom properties in app/globals.css. */
const config: Config = {
  content: ["./app/**/*.{ts,tsx}", "./components/**/*.{ts,tsx}", "./lib/display/**/*.ts"],
  darkMode: ["selector", '[data-theme="dark"]'],
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
      },
      fontFamily: {
        sans: ["var(--font-archivo)", "system-ui", "sans-serif"],
        mono: ["var(--font-spline-mono)", "ui-monospace", "monospace"],
      },
      borderRadius: { none: "0" },
    },
  },
};
export default config;
