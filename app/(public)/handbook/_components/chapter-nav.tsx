import Link from "next/link";
import type { Chapter } from "./chapter";
import { CHAPTERS } from "./chapters";

const line =
  "inline-flex min-h-8 items-center underline decoration-hairline underline-offset-4 hover:decoration-ink";

/** Beside a chapter: its own headings, then the other chapters. */
export function ChapterNav({ chapter }: { chapter: Chapter }) {
  return (
    <div className="no-print flex flex-col gap-6 text-sm">
      {chapter.sections.length > 1 && (
        <nav aria-label="On this page">
          <p className="font-semibold">On this page</p>
          <ul>
            {chapter.sections.map((section) => (
              <li key={section.id}>
                <a href={`#${section.id}`} className={line}>
                  {section.title}
                </a>
              </li>
            ))}
          </ul>
        </nav>
      )}
      <nav aria-label="Handbook">
        <p className="font-semibold">
          <Link href="/handbook" className={line}>
            Handbook
          </Link>
        </p>
        <ul>
          {CHAPTERS.map((other) => (
            <li key={other.slug}>
              <Link
                href={`/handbook/${other.slug}`}
                aria-current={other.slug === chapter.slug ? "page" : undefined}
                className={`${line} aria-[current]:decoration-buoy aria-[current]:font-semibold`}
              >
                {other.title}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
    </div>
  );
}
