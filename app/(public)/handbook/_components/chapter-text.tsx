import type { Chapter } from "./chapter";

/** A chapter as running text; on one page with others its headings step one level down. */
export function ChapterText({ chapter, nested = false }: { chapter: Chapter; nested?: boolean }) {
  const Heading = nested ? "h3" : "h2";
  const idOf = (id: string) => (nested ? `${chapter.slug}-${id}` : id);
  return (
    <div className="prose">
      {chapter.sections.map((section) => (
        <section
          key={section.id}
          id={idOf(section.id)}
          aria-labelledby={`${idOf(section.id)}-title`}
          className="space-y-4"
        >
          {(chapter.sections.length > 1 || section.title !== chapter.title) && (
            <Heading id={`${idOf(section.id)}-title`}>{section.title}</Heading>
          )}
          {section.body}
        </section>
      ))}
    </div>
  );
}
