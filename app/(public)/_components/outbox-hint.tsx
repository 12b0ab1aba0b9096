import Link from "next/link";
import { isOutboxOpen } from "@/lib/server/mail/list-outbox";
import { env } from "@/lib/server/env/env";

/** Where mail is to be found when none leaves this machine. */
export function OutboxHint({ className = "mt-6 max-w-xl" }: { className?: string }) {
  if (!isOutboxOpen(env()) || env().smtpUrl !== null) return null;
  return (
    <p className={className}>
      No mail leaves this machine.{" "}
      <Link href="/dev/outbox" className="link inline-flex min-h-6 items-center">
        Read it in the outbox
      </Link>
    </p>
  );
}
