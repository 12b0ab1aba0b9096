import { describe, expect, it } from "vitest";
import { FIGURE_DEFINITIONS } from "@/lib/analysis/definitions";
import { chapterAt, CHAPTERS, contents } from "./chapters";

describe("the handbook", () => {
  it("has one address for every chapter and every figure, and none for anything else", () => {
    const slugs = [...CHAPTERS.map((chapter) => chapter.slug), ...FIGURE_DEFINITIONS.map((f) => f.key)];
    expect(new Set(slugs).size).toBe(slugs.length);
    for (const slug of slugs) expect(chapterAt(slug)?.sections.length).toBeGreaterThan(0);
    expect(chapterAt("nowhere")).toBeNull();
    expect(chapterAt("")).toBeNull();
  });

  it("has one heading id only once in a chapter", () => {
    for (const chapter of CHAPTERS) {
      const ids = chapter.sections.map((section) => section.id);
      expect(new Set(ids).size).toBe(ids.length);
    }
  });

  it("lists every heading when nothing is searched for", () => {
    const listed = contents("").flatMap((entry) => entry.headings);
    expect(listed.length).toBe(CHAPTERS.reduce((sum, chapter) => sum + chapter.sections.length, 0));
  });

  it("finds headings by words in any order and case, and nothing for nonsense", () => {
    const found = contents("RATIO glide").flatMap((entry) => entry.headings.map((heading) => heading.title));
    expect(found).toContain("Glide ratio");
    expect(found).not.toContain("Cookies");
    expect(contents("xyzzy")).toEqual([]);
  });
});
