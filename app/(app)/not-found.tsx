import type { Metadata } from "next";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";

export const metadata: Metadata = { title: "Not here" };

export default function NotFound() {
  return (
    <>
      <PageHeader
        title="This page is not here"
        subtitle="It may have been deleted, the address may be mistyped, or it belongs to somebody else."
      />
      <div className="flex flex-wrap gap-3">
        <LinkButton href="/sessions" look="main">
          To the sessions
        </LinkButton>
        <LinkButton href="/quiver">To the quiver</LinkButton>
      </div>
    </>
  );
}
