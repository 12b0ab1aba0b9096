/** What a canvas cannot read from a class name. */
export type ThemeTokens = {
  readonly paper: string;
  readonly sheet: string;
  readonly ink: string;
  readonly muted: string;
  readonly hairline: string;
  readonly kelp: string;
  readonly shell: string;
  readonly buoy: string;
  readonly buoyText: string;
  readonly swell: string;
  readonly water: string;
  readonly land: string;
};

export type Theme = "light" | "dark";

const TOKENS: Readonly<Record<Theme, ThemeTokens>> = {
  light: {
    paper: "#f4f1e9",
    sheet: "#fbf9f4",
    ink: "#10272b",
    muted: "#47595b",
    hairline: "#cfc9ba",
    kelp: "#cfe0db",
    shell: "#f3d9c9",
    buoy: "#e4572e",
    buoyText: "#af3412",
    swell: "#1b6373",
    water: "#dde8e4",
    land: "#ede6d3",
  },
  dark: {
    paper: "#0c1b1e",
    sheet: "#12262a",
    ink: "#edeae0",
    muted: "#9fb0af",
    hairline: "#2a4146",
    kelp: "#1f4a45",
    shell: "#5a3a2b",
    buoy: "#ff7a52",
    buoyText: "#ff8f6b",
    swell: "#6fb9c4",
    water: "#14313a",
    land: "#262f2b",
  },
};

/**
 * The colours of a theme as hexadecimal text, equal to the custom properties of app/globals.css (a test holds
 * them together). For canvas drawings; everything else uses the class names.
 *
 * @example
 * themeTokens("light").ink; // "#10272b"
 */
export function themeTokens(theme: Theme): ThemeTokens {
  return TOKENS[theme];
}
