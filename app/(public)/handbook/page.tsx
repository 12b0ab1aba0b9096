import type { Metadata } from "next";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { ContentsList } from "./_components/contents-list";

export const metadata: Metadata = { title: "Handbook", robots: { index: true } };

export default async function HandbookPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const { q } = await searchParams;
  const search = (typeof q === "string" ? q : "").trim().slice(0, 80);
  return (
    <>
      <PageHeader
        title="Handbook"
        subtitle="How every figure is worked out, from what, and where it stops being true."
        actions={<LinkButton href="/handbook/whole">All on one page, for paper</LinkButton>}
      />
      <ContentsList search={search} />
    </>
  );
}
