import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { PageHeader } from "@/components/ui/page-header";
import { ChapterNav } from "@/app/(public)/handbook/_components/chapter-nav";
import { ChapterText } from "@/app/(public)/handbook/_components/chapter-text";
import { chapterAt } from "@/app/(public)/handbook/_components/chapters";

type Props = { params: Promise<{ chapter: string }> };

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const chapter = chapterAt((await params).chapter);
  return chapter ? { title: `${chapter.title}, handbook`, robots: { index: true } } : { title: "Not here" };
}

export default async function ChapterPage({ params }: Props) {
  const chapter = chapterAt((await params).chapter);
  if (!chapter) notFound();
  return (
    <>
      <PageHeader title={chapter.title} subtitle={chapter.summary} />
      <div className="rule-ink grid gap-x-12 gap-y-10 pt-6 lg:grid-cols-[minmax(0,1fr)_16rem]">
        <ChapterText chapter={chapter} />
        <ChapterNav chapter={chapter} />
      </div>
    </>
  );
}
