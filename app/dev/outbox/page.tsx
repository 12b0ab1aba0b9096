import type { Metadata } from "next";
import { Frame } from "@/app/frame";
import { EmptyState } from "@/components/ui/empty-state";
import { PageHeader } from "@/components/ui/page-header";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { listOutbox } from "@/lib/server/mail/list-outbox";
import { OutboxMessage } from "./_components/outbox-message";

export const metadata: Metadata = { title: "Outbox", robots: { index: false } };

export default async function OutboxPage() {
  const messages = await pageRead("/dev/outbox", async () => listOutbox(await requestContext()));
  return (
    <Frame>
      <PageHeader
        title="Outbox"
        subtitle="The newest 50 messages. This page is in development and the demo only."
      />
      {messages.length === 0 ? (
        <EmptyState kind="first" title="No messages yet">
          Make an account or ask for a new password, and the message shows here.
        </EmptyState>
      ) : (
        <ol className="rule-ink">
          {messages.map((message) => (
            <OutboxMessage key={message.id} message={message} />
          ))}
        </ol>
      )}
    </Frame>
  );
}
