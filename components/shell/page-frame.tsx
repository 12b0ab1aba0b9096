import type { ReactNode } from "react";
import { DemoBanner } from "./demo-banner";
import { SiteFooter } from "./site-footer";
import { SiteHeader, type SiteHeaderProps } from "./site-header";
import { SkipLink } from "./skip-link";
import type { ThemeChoice } from "./theme-switch";

export type PageFrameProps = SiteHeaderProps & {
  demo: boolean;
  theme: ThemeChoice;
  children: ReactNode;
};

/** The sheet every page is printed on. */
export function PageFrame({ person, signOut, demo, theme, children }: PageFrameProps) {
  return (
    <div className="flex min-h-dvh flex-col print:min-h-0">
      <SkipLink />
      {demo && <DemoBanner />}
      <SiteHeader person={person} signOut={signOut} />
      <main id="main" tabIndex={-1} className="page flex-1 pb-16 focus:outline-none print:pb-4">
        {children}
      </main>
      <SiteFooter theme={theme} />
    </div>
  );
}
