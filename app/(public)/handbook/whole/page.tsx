import type { Metadata } from "next";
import { ChapterText } from "@/app/(public)/handbook/_components/chapter-text";
import { CHAPTERS } from "@/app/(public)/handbook/_components/chapters";
import { PageHeader } from "@/components/ui/page-header";

export const metadata: Metadata = { title: "The whole handbook" };

export default function WholeHandbookPage() {
  return (
    <>
      <PageHeader
        title="The whole handbook"
        subtitle="Every chapter on one page: to print, and to search with the browser."
      />
      {CHAPTERS.map((chapter) => (
        <section
          key={chapter.slug}
          aria-labelledby={`chapter-${chapter.slug}`}
          className="rule-ink mt-10 pt-4"
        >
          <h2 id={`chapter-${chapter.slug}`} className="text-2xl">
            {chapter.title}
          </h2>
          <p className="text-muted mt-1">{chapter.summary}</p>
          <ChapterText chapter={chapter} nested />
        </section>
      ))}
    </>
  );
}
