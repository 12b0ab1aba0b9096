import { useSyncExternalStore } from "react";
import type { Theme } from "@/lib/display/theme-tokens";

const DARK = "(prefers-color-scheme: dark)";

function subscribe(changed: () => void): () => void {
  const media = window.matchMedia(DARK);
  const observer = new MutationObserver(changed);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ["data-theme"] });
  media.addEventListener("change", changed);
  return () => {
    observer.disconnect();
    media.removeEventListener("change", changed);
  };
}

function current(): Theme {
  const chosen = document.documentElement.dataset["theme"];
  if (chosen === "light" || chosen === "dark") return chosen;
  return window.matchMedia(DARK).matches ? "dark" : "light";
}

/** The theme in force: the one chosen on the page, else the system's. */
export function useTheme(): Theme {
  return useSyncExternalStore(subscribe, current, () => "light");
}
