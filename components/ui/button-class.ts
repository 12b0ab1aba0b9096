import { classNames } from "@/lib/display/class-names";

/** main: the one thing to do here. plain: framed. quiet: words with an underline. danger: ends something. */
export type ButtonLook = "main" | "plain" | "quiet" | "danger";
export type ButtonSize = "normal" | "small";

const LOOKS: Readonly<Record<ButtonLook, string>> = {
  main: "border border-ink bg-ink text-paper hover:bg-buoy-text hover:border-buoy-text",
  plain: "border border-ink bg-sheet text-ink hover:bg-kelp",
  quiet: "text-ink underline decoration-buoy decoration-2 underline-offset-4 hover:decoration-ink",
  danger: "border border-buoy-text bg-sheet text-buoy-text hover:bg-buoy-text hover:text-paper",
};

/** The one look of everything that is pressed; 44 px high, small ones 32 px for dense desks. */
export function buttonClass(look: ButtonLook, size: ButtonSize, extra?: string): string {
  return classNames(
    "inline-flex items-center justify-center gap-2 text-center font-semibold leading-tight no-print",
    "disabled:opacity-60 aria-disabled:opacity-60",
    size === "small" ? "min-h-8 text-sm" : "min-h-11",
    look === "quiet" ? "px-0" : size === "small" ? "px-3 py-1" : "px-4 py-2",
    LOOKS[look],
    extra,
  );
}
