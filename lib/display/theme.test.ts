import { readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { contrastRatio } from "./contrast-ratio";
import { speedRamp } from "./speed-ramp";
import { themeTokens, type Theme, type ThemeTokens } from "./theme-tokens";

const THEMES: readonly Theme[] = ["light", "dark"];
type Token = keyof ThemeTokens;

/* WCAG 2.2, 1.4.3: text 4.5:1; 1.4.11: lines, controls and focus 3:1. */
const TEXT: readonly (readonly [Token, readonly Token[]])[] = [
  ["ink", ["paper", "sheet", "kelp", "shell", "water", "land"]],
  ["muted", ["paper", "sheet", "water", "land"]],
  ["buoyText", ["paper", "sheet", "water", "land"]],
  ["swell", ["paper", "sheet"]],
  ["paper", ["ink", "buoyText"]],
];
const LINES: readonly (readonly [Token, readonly Token[]])[] = [
  ["ink", ["paper", "sheet", "water", "land", "kelp", "shell"]],
  ["buoy", ["paper", "sheet"]],
  ["swell", ["paper", "sheet", "water", "land"]],
];

const pairs = (list: typeof TEXT) =>
  THEMES.flatMap((theme) =>
    list.flatMap(([front, backs]) => backs.map((back) => [theme, front, back] as const)),
  );

/** Linear light under a full deficiency. Source: Machado, Oliveira and Fernandes 2009, severity 1.0 (values from memory). */
const DEFICIENCIES: Readonly<Record<string, readonly (readonly [number, number, number])[]>> = {
  protan: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deutan: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritan: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

function seenLuminance(hex: string, matrix: readonly (readonly [number, number, number])[]): number {
  const linear = [1, 3, 5].map((i) => {
    const c = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  const seen = matrix.map((row) =>
    Math.min(
      1,
      Math.max(
        0,
        row.reduce((sum, k, i) => sum + k * (linear[i] ?? NaN), 0),
      ),
    ),
  );
  return 0.2126 * (seen[0] ?? NaN) + 0.7152 * (seen[1] ?? NaN) + 0.0722 * (seen[2] ?? NaN);
}

describe("colour tokens", () => {
  it("gives black on white the full ratio and a colour on itself none (WCAG 2.2)", () => {
    expect(contrastRatio("#000000", "#ffffff")).toBeCloseTo(21, 10);
    expect(contrastRatio("#777777", "#777777")).toBe(1);
    // #767676 on white is 4.54:1, the usual example of the lightest grey that passes (value from memory).
    expect(contrastRatio("#767676", "#ffffff")).toBeCloseTo(4.54, 2);
  });

  it.each(pairs(TEXT))("%s: %s can be read on %s", (theme, front, back) => {
    const tokens = themeTokens(theme);
    expect(contrastRatio(tokens[front], tokens[back])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(pairs(LINES))("%s: a %s line shows on %s", (theme, front, back) => {
    const tokens = themeTokens(theme);
    expect(contrastRatio(tokens[front], tokens[back])).toBeGreaterThanOrEqual(3);
  });

  it("equal the custom properties of the style sheet, in both places of the dark theme", () => {
    const css = readFileSync(path.resolve(import.meta.dirname, "../../app/globals.css"), "utf8");
    const property = (token: string) => `--${token.replace(/[A-Z]/g, (c) => `-${c.toLowerCase()}`)}`;
    for (const [theme, places] of [
      ["light", 1],
      ["dark", 2],
    ] as const) {
      for (const [band, colour] of speedRamp(theme).entries()) {
        // The light ramp stands once more for paper.
        expect(css.split(`--speed-${band}: ${colour};`).length - 1, `${theme} band ${band}`).toBe(2);
      }
      for (const [token, value] of Object.entries(themeTokens(theme))) {
        expect(css.split(`${property(token)}: ${value};`).length - 1, `${theme} ${token}`).toBe(places);
      }
    }
  });
});

describe.each(THEMES)("the speed ramp, %s", (theme) => {
  const ramp = speedRamp(theme);
  const tokens = themeTokens(theme);

  it.each(["water", "land", "sheet", "paper"] as const)("keeps 3:1 to the %s at every step", (back) => {
    for (const colour of ramp) expect(contrastRatio(colour, tokens[back])).toBeGreaterThanOrEqual(3);
  });

  it.each(Object.entries(DEFICIENCIES))("keeps its order for %s sight, step by step", (_name, matrix) => {
    const seen = ramp.map((colour) => seenLuminance(colour, matrix) + 0.05);
    for (let i = 1; i < seen.length; i += 1) {
      const [before = NaN, after = NaN] = [seen[i - 1], seen[i]];
      // 1.1:1 between neighbours: a step that is seen side by side (our own bound).
      expect(theme === "light" ? before / after : after / before).toBeGreaterThan(1.1);
    }
  });
});
