import { cautionsChapter } from "./cautions-chapter";
import type { Chapter } from "./chapter";
import { comparisonsChapter } from "./comparisons-chapter";
import { figuresChapter } from "./figures-chapter";
import { formatsChapter } from "./formats-chapter";
import { privacyChapter } from "./privacy-chapter";
import { qualityChapter } from "./quality-chapter";
import { readingChapter } from "./reading-chapter";
import { unitsChapter } from "./units-chapter";

/** The handbook in reading order. */
export const CHAPTERS: readonly Chapter[] = [
  figuresChapter,
  readingChapter,
  qualityChapter,
  formatsChapter,
  comparisonsChapter,
  unitsChapter,
  privacyChapter,
  cautionsChapter,
];

/**
 * The chapter at an address; the key of a figure is an address too and gives a chapter of that figure alone, so
 * that a figure on a session page can lead to its own explanation.
 */
export function chapterAt(slug: string): Chapter | null {
  const chapter = CHAPTERS.find((candidate) => candidate.slug === slug);
  if (chapter) return chapter;
  const figure = figuresChapter.sections.find((section) => section.id === slug);
  return figure
    ? {
        slug,
        title: figure.title,
        summary: "One figure of a session: what it is, its formula, its source and its limits.",
        sections: [figure],
      }
    : null;
}

/** A heading of the handbook with the way to it. */
export type Heading = { readonly href: string; readonly title: string };

export type ContentsEntry = {
  readonly chapter: Chapter;
  readonly headings: readonly Heading[];
};

/** The list of contents, or what of it matches a search: every word has to stand in the heading or its chapter's title. */
export function contents(search: string): ContentsEntry[] {
  const words = search.toLowerCase().split(/\s+/).filter(Boolean);
  const matches = (text: string) => words.every((word) => text.toLowerCase().includes(word));
  return CHAPTERS.flatMap((chapter) => {
    const title = `${chapter.title} ${chapter.summary}`;
    const headings = chapter.sections
      .filter((section) => matches(title) || matches(`${section.title} ${chapter.title}`))
      .map((section) => ({ href: `/handbook/${chapter.slug}#${section.id}`, title: section.title }));
    return headings.length > 0 ? [{ chapter, headings }] : [];
  });
}
