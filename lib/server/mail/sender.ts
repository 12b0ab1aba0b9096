import { createTransport } from "nodemailer";
import type { Database } from "@/db/client";
import { logEvent } from "@/lib/server/context/log";
import { sendDue, type Send } from "./send-due";

const LOOK_EVERY_MS = 3000;

/** Sends through the SMTP server at a URL; a server that hangs is given up after 20 s. */
export function smtpSend(smtpUrl: string, from: string, patienceMs = 20_000): Send {
  // Its own limits are minutes long, and one round waits for each message.
  const transport = createTransport(
    { url: smtpUrl, connectionTimeout: patienceMs, greetingTimeout: patienceMs, socketTimeout: patienceMs },
    { from },
  );
  return async ({ to, subject, text }) => {
    await transport.sendMail({
      from,
      to,
      subject,
      text,
      // Machines answer letters from machines; this says not to (RFC 3834, section 5).
      headers: { "Auto-Submitted": "auto-generated" },
    });
  };
}

/** Looks into the outbox every few seconds and sends what is due, one round at a time. Gives back how to stop. */
export function startSender(db: Database, send: Send): () => void {
  let isBusy = false;
  const round = async () => {
    if (isBusy) return;
    isBusy = true;
    try {
      await sendDue(db, send, Date.now());
    } catch (error) {
      logEvent("error", "mail_round_failed", {
        error: error instanceof Error ? error.message : String(error),
      });
    } finally {
      isBusy = false;
    }
  };
  const timer = setInterval(() => void round(), LOOK_EVERY_MS);
  timer.unref();
  return () => clearInterval(timer);
}
