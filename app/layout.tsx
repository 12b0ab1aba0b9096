import type { Metadata, Viewport } from "next";
import type { ReactNode } from "react";
import { Toaster } from "@/components/ui/toaster";
import { fontVariables } from "./fonts";
import "./globals.css";
import { themeChoice } from "./theme-choice";

export const metadata: Metadata = {
  title: { default: "Trimwake", template: "%s - Trimwake" },
  description:
    "The working log and test bench of people who ride, coach, race and develop hydrofoils on open water.",
  robots: { index: false },
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#f4f1e9" },
    { media: "(prefers-color-scheme: dark)", color: "#0c1b1e" },
  ],
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en-GB" data-theme={await themeChoice()} className={fontVariables}>
      <body>
        {children}
        <Toaster />
      </body>
    </html>
  );
}
