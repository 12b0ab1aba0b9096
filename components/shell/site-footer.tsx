import Link from "next/link";
import { CAUTIONS } from "./cautions";
import { ThemeSwitch, type ThemeChoice } from "./theme-switch";

/** The cautions stand on every page; help stands in the same place on every page. */
export function SiteFooter({ theme }: { theme: ThemeChoice }) {
  return (
    <footer className="border-ink mt-auto border-t">
      <div className="page grid gap-x-12 gap-y-6 py-8 print:py-2 md:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <div className="text-muted flex max-w-2xl flex-col gap-2 text-sm">
          <p>{CAUTIONS.water}</p>
          <p>{CAUTIONS.speed}</p>
        </div>
        <div className="no-print flex flex-col gap-4 md:items-end">
          <nav aria-label="Help">
            <ul className="flex flex-wrap gap-x-6 text-sm">
              <li>
                <Link href="/handbook" className="link inline-flex min-h-8 items-center">
                  Handbook
                </Link>
              </li>
              <li>
                <Link href="/handbook/cautions" className="link inline-flex min-h-8 items-center">
                  Cautions
                </Link>
              </li>
              <li>
                <Link href="/handbook/privacy" className="link inline-flex min-h-8 items-center">
                  Privacy
                </Link>
              </li>
            </ul>
          </nav>
          <ThemeSwitch initial={theme} />
        </div>
      </div>
    </footer>
  );
}
