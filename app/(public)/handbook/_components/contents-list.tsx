import Link from "next/link";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { TextField } from "@/components/ui/fields";
import { LinkButton } from "@/components/ui/link-button";
import { contents } from "./chapters";

/** The headings of the handbook with a search over them; the search is an address, so it works without JavaScript. */
export function ContentsList({ search }: { search: string }) {
  const entries = contents(search);
  return (
    <>
      <form action="/handbook" role="search" className="no-print flex max-w-xl items-end gap-3">
        <TextField
          name="q"
          label="Search the headings"
          type="search"
          defaultValue={search}
          maxLength={80}
          className="flex-1"
        />
        <Button type="submit">Search</Button>
      </form>
      <div className="mt-8 flex flex-col gap-8">
        {entries.length === 0 && (
          <EmptyState
            kind="none"
            title={`No heading holds “${search}”`}
            action={<LinkButton href="/handbook">Show all headings</LinkButton>}
          >
            The search looks at headings and chapter titles, not at the text under them.
          </EmptyState>
        )}
        {entries.map(({ chapter, headings }) => (
          <section key={chapter.slug} aria-labelledby={`contents-${chapter.slug}`} className="rule-ink pt-3">
            <div className="grid gap-x-12 gap-y-2 md:grid-cols-[minmax(0,2fr)_minmax(0,3fr)]">
              <div>
                <h2 id={`contents-${chapter.slug}`} className="text-lg">
                  <Link href={`/handbook/${chapter.slug}`} className="link">
                    {chapter.title}
                  </Link>
                </h2>
                <p className="text-muted mt-1 text-sm">{chapter.summary}</p>
              </div>
              <ul className="columns-1 gap-x-8 sm:columns-2">
                {headings.map((heading) => (
                  <li key={heading.href} className="break-inside-avoid">
                    <Link
                      href={heading.href}
                      className="decoration-hairline hover:decoration-ink inline-flex min-h-8 items-center underline underline-offset-4"
                    >
                      {heading.title}
                    </Link>
                  </li>
                ))}
              </ul>
            </div>
          </section>
        ))}
      </div>
    </>
  );
}
