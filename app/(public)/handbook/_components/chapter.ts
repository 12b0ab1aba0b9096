import type { ReactNode } from "react";

/** One heading of a chapter with what stands under it. */
export type ChapterSection = {
  readonly id: string;
  readonly title: string;
  readonly body: ReactNode;
};

/** A chapter of the handbook: its address is /handbook/<slug>. */
export type Chapter = {
  readonly slug: string;
  readonly title: string;
  /** One sentence for the list of contents and under the title. */
  readonly summary: string;
  readonly sections: readonly ChapterSection[];
};
