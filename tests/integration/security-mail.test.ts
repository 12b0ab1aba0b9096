import { createServer, type AddressInfo } from "node:net";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { at } from "@/lib/errors/invariant";
import { signUp } from "@/lib/server/accounts/sign-up";
import { listOutbox } from "@/lib/server/mail/list-outbox";
import type { Message } from "@/lib/server/mail/messages";
import * as messages from "@/lib/server/mail/messages";
import { queueMail } from "@/lib/server/mail/queue-mail";
import { sendDue, sweepOutbox, type Letter } from "@/lib/server/mail/send-due";
import { smtpSend } from "@/lib/server/mail/sender";
import { letters, PASSWORD } from "@/tests/support/accounts";
import { openTestDatabase, testContext, TEST_NOW_MS } from "@/tests/support/test-database";

const MINUTE_MS = 60_000;
const MESSAGE: Message = { subject: "A test", body: "A link: https://trimwake.example/reset?token=abc\n" };

let db: Database;
let close: () => Promise<void>;

beforeEach(async () => {
  vi.spyOn(process.stdout, "write").mockReturnValue(true);
  ({ db, close } = await openTestDatabase());
});
afterEach(() => close());

const queue = (to = "aske@riders.example") =>
  db.write((tx) => queueMail(tx, { to, message: MESSAGE, nowMs: TEST_NOW_MS }));

describe("the outbox", () => {
  test("holds no message of a change that did not happen", async () => {
    const failing = db.write(async (tx) => {
      await queueMail(tx, { to: "aske@riders.example", message: MESSAGE, nowMs: TEST_NOW_MS });
      throw new Error("the change failed");
    });
    await expect(failing).rejects.toThrow("the change failed");
    expect(await letters(db)).toHaveLength(0);
  });

  test("shows its messages in development and in the demo", async () => {
    await queue();
    for (const settings of [
      { mode: "development", demo: false },
      { mode: "production", demo: true },
    ] as const) {
      expect(await listOutbox(testContext(db), settings)).toHaveLength(1);
    }
  });

  test("is not there in production, whoever asks", async () => {
    await queue();
    const settings = { mode: "production", demo: false } as const;
    for (const ctx of [testContext(db), testContext(db, { userId: "somebody" })]) {
      await expect(listOutbox(ctx, settings)).rejects.toMatchObject({ code: "not_found" });
    }
  });
});

describe("sendDue", () => {
  const collect = () => {
    const sent: Letter[] = [];
    return {
      sent,
      send: async (letter: Letter) => {
        sent.push(letter);
      },
    };
  };

  test("sends each message once and keeps no text of it: its link is a key", async () => {
    await queue();
    const { sent, send } = collect();
    expect(await sendDue(db, send, TEST_NOW_MS)).toBe(1);
    expect(await sendDue(db, send, TEST_NOW_MS + 1)).toBe(0);
    expect(sent).toEqual([{ to: "aske@riders.example", subject: MESSAGE.subject, text: MESSAGE.body }]);
    expect(at(await letters(db), 0)).toMatchObject({ body: "", sentAtMs: TEST_NOW_MS, attempts: 1 });
  });

  test("tries again after 1, 5, 30, 120, 480 and 1440 minutes, then gives up", async () => {
    await queue();
    const tries: number[] = [];
    for (let minute = 0; minute <= 3000; minute += 1) {
      const failing = async () => {
        tries.push(minute);
        throw new Error("refused");
      };
      await sendDue(db, failing, TEST_NOW_MS + minute * MINUTE_MS);
    }
    expect(tries).toEqual([0, 1, 5, 30, 120, 480, 1440]);
  });

  test("one mailbox that refuses does not keep the others waiting", async () => {
    await queue("full@riders.example");
    await queue("aske@riders.example");
    const { sent, send } = collect();
    const partly = async (letter: Letter) => {
      if (letter.to.startsWith("full")) throw new Error("mailbox full");
      await send(letter);
    };
    expect(await sendDue(db, partly, TEST_NOW_MS)).toBe(1);
    expect(sent.map((letter) => letter.to)).toEqual(["aske@riders.example"]);
  });

  test("sends at once what was written under a clock that has been set back since", async () => {
    await queue();
    const { sent, send } = collect();
    await sendDue(db, send, TEST_NOW_MS - 86_400_000);
    expect(sent).toHaveLength(1);
  });

  test("messages of more than a week ago are swept", async () => {
    await queue();
    expect(await sweepOutbox(db, TEST_NOW_MS + 7 * 1440 * MINUTE_MS)).toBe(0);
    expect(await sweepOutbox(db, TEST_NOW_MS + 7 * 1440 * MINUTE_MS + 1)).toBe(1);
  });
});

/** As much of RFC 5321 as one message needs, on this machine. */
async function smtpServer(): Promise<{ url: string; received: string[]; stop: () => void }> {
  const received: string[] = [];
  const server = createServer((socket) => {
    let isData = false;
    let text = "";
    socket.write("220 test\r\n");
    socket.on("data", (chunk) => {
      text += chunk.toString();
      if (isData) {
        if (!text.endsWith("\r\n.\r\n")) return;
        received.push(text);
        isData = false;
        text = "";
        socket.write("250 kept\r\n");
        return;
      }
      const command = text.slice(0, 4).toUpperCase();
      received.push(text.trim());
      text = "";
      isData = command === "DATA";
      socket.write(isData ? "354 go on\r\n" : command === "QUIT" ? "221 bye\r\n" : "250 test\r\n");
    });
  });
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.address() as AddressInfo;
  return { url: `smtp://127.0.0.1:${port}`, received, stop: () => server.close() };
}

test("a message goes through an SMTP server as plain text that asks for no automatic answer", async () => {
  await signUp(testContext(db), {
    email: "aske@riders.example",
    password: PASSWORD,
    name: "Aske",
    weight: "",
  });
  const server = await smtpServer();
  const send = smtpSend(server.url, "Trimwake <no-reply@trimwake.example>");
  expect(await sendDue(db, send, TEST_NOW_MS)).toBe(1);
  server.stop();
  const dialogue = server.received.join("\n");
  expect(dialogue).toMatch(/MAIL FROM:<no-reply@trimwake\.example>/);
  expect(dialogue).toMatch(/RCPT TO:<aske@riders\.example>/);
  expect(dialogue).toMatch(/^Auto-Submitted: auto-generated\r?$/im);
  expect(dialogue).toMatch(/^Content-Type: text\/plain; charset=utf-8\r?$/m);
});

test("a mail server that takes the call and then says nothing is given up", async () => {
  const silent = createServer(() => undefined);
  await new Promise<void>((resolve) => silent.listen(0, "127.0.0.1", resolve));
  const { port } = silent.address() as AddressInfo;
  const send = smtpSend(`smtp://127.0.0.1:${port}`, "Trimwake <no-reply@trimwake.example>", 300);
  const began = performance.now();
  await expect(send({ to: "aske@riders.example", subject: "s", text: "t" })).rejects.toThrow();
  expect(performance.now() - began).toBeLessThan(5000);
  silent.close();
});

test("every message is in plain words: no exclamation marks, no pleading, no apology", () => {
  const all = [
    messages.confirmMessage("https://trimwake.example", "t"),
    messages.alreadyHereMessage("https://trimwake.example"),
    messages.resetMessage("https://trimwake.example", "t"),
    messages.passwordChangedMessage("https://trimwake.example"),
    messages.addressChangedMessage(),
  ];
  for (const { subject, body } of all) {
    expect(`${subject}\n${body}`).not.toMatch(/!|please|sorry|oops/i);
    expect(subject).not.toMatch(/[\r\n]/);
    expect(body.endsWith("\n")).toBe(true);
  }
});
