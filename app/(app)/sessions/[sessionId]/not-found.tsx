import type { Metadata } from "next";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";

export const metadata: Metadata = { title: "No such session" };

export default function SessionNotFound() {
  return (
    <>
      <PageHeader
        title="This session is not in your log"
        subtitle="It may have been deleted more than 30 days ago, the address may be mistyped, or it is another rider's."
      />
      <div className="flex flex-wrap gap-3">
        <LinkButton href="/sessions" look="main">
          To the sessions
        </LinkButton>
        <LinkButton href="/upload">Upload tracks</LinkButton>
      </div>
    </>
  );
}
