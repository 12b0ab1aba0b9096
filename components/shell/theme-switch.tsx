"use client";

import { useId, useSyncExternalStore } from "react";
import { useLive } from "@/components/ui/use-live";

export type ThemeChoice = "system" | "light" | "dark";

const CHOICES: readonly { value: ThemeChoice; label: string }[] = [
  { value: "system", label: "As the system" },
  { value: "light", label: "Light" },
  { value: "dark", label: "Dark" },
];

const YEAR_S = 31_536_000;

/** Dresses the document and keeps the choice for the next page; drawings listen for "themechange". */
export function applyTheme(choice: ThemeChoice): void {
  document.documentElement.dataset.theme = choice;
  const secure = location.protocol === "https:" ? "; Secure" : "";
  document.cookie = `theme=${choice}; Path=/; Max-Age=${YEAR_S}; SameSite=Lax${secure}`;
  window.dispatchEvent(new Event("themechange"));
}

/** Two switches on one page (the footer's and the one in the settings) show one choice. */
function whenThemeChanges(changed: () => void): () => void {
  window.addEventListener("themechange", changed);
  return () => window.removeEventListener("themechange", changed);
}

/**
 * Light, dark, or as the system. It takes no server; before JavaScript runs it is not there, so that no control
 * does nothing, and its place is kept.
 */
export function ThemeSwitch({
  initial,
  onChosen,
}: {
  initial: ThemeChoice;
  onChosen?: (choice: ThemeChoice) => void;
}) {
  const name = useId();
  const chosen = useSyncExternalStore(
    whenThemeChanges,
    () => document.documentElement.dataset.theme ?? initial,
    () => initial,
  );
  const live = useLive();
  return (
    <div className="min-h-9">
      {live && (
        <fieldset>
          <legend className="sr-only">Colours of the page</legend>
          <div className="border-ink inline-flex border text-sm">
            {CHOICES.map((choice) => (
              <label
                key={choice.value}
                className="has-checked:bg-ink has-checked:text-paper has-focus-visible:outline-buoy hover:bg-kelp flex min-h-8 items-center px-3 has-focus-visible:outline-3 has-focus-visible:outline-offset-2"
              >
                <input
                  type="radio"
                  name={name}
                  className="sr-only"
                  value={choice.value}
                  checked={chosen === choice.value}
                  onChange={() => {
                    applyTheme(choice.value);
                    onChosen?.(choice.value);
                  }}
                />
                {choice.label}
              </label>
            ))}
          </div>
        </fieldset>
      )}
    </div>
  );
}
