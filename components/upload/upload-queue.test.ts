import { describe, expect, test } from "vitest";
import { announcement, isBusy, type ImportResult } from "./upload-item";
import { UploadQueue, type SendResult, type UploadWork } from "./upload-queue";

type Sent = {
  name: string;
  share: (share: number) => void;
  end: (result: SendResult) => void;
  stopped: boolean;
};
type Asked = { uploadId: string; setupId: string | null; end: (result: ImportResult) => void };

function bench(limits = { sendingAtOnce: 2, bytesMax: 1000, filesMax: 5 }) {
  const sent: Sent[] = [];
  const asked: Asked[] = [];
  const work: UploadWork = {
    send: (file, share) => {
      let end: (result: SendResult) => void = () => undefined;
      const result = new Promise<SendResult>((resolve) => {
        end = resolve;
      });
      const entry: Sent = { name: file.name, share, end, stopped: false };
      sent.push(entry);
      return {
        result,
        stop: () => {
          entry.stopped = true;
        },
      };
    },
    importFile: (uploadId, setupId) =>
      new Promise((end) => {
        asked.push({ uploadId, setupId, end });
      }),
  };
  return { queue: new UploadQueue(work, limits), sent, asked };
}

const file = (name: string, bytes = 10) => new File([new Uint8Array(bytes)], name);
const settle = () => new Promise((resolve) => setTimeout(resolve, 0));
const steps = (queue: UploadQueue) => queue.items().map(({ name, state }) => `${name} ${state.step}`);
const read: ImportResult = {
  ok: true,
  verdicts: [
    {
      kind: "read",
      entryName: "",
      sessionId: "s1",
      title: "A to B",
      startMs: 0,
      timeZone: "UTC",
      waterDistanceM: 1,
      elapsedS: 1,
      cutBeforeS: 0,
      cutAfterS: 0,
      notes: [],
      sameAs: null,
    },
  ],
};

describe("the upload queue", () => {
  test("sends two files at a time in the order given and reads one after the other", async () => {
    const { queue, sent, asked } = bench();
    queue.add([file("a"), file("b"), file("c")]);
    expect(steps(queue)).toEqual(["a sending", "b sending", "c waiting"]);
    sent[1]?.end({ ok: true, uploadId: "u-b" });
    await settle();
    expect(steps(queue)).toEqual(["a sending", "b reading", "c sending"]);
    sent[0]?.end({ ok: true, uploadId: "u-a" });
    await settle();
    expect(steps(queue)).toEqual(["a stored", "b reading", "c sending"]);
    asked[0]?.end(read);
    await settle();
    expect(steps(queue)).toEqual(["a reading", "b done", "c sending"]);
    expect(asked.map(({ uploadId }) => uploadId)).toEqual(["u-b", "u-a"]);
  });

  test("stops a file and lets the next one go; the late answer changes nothing", async () => {
    const { queue, sent } = bench({ sendingAtOnce: 1, bytesMax: 1000, filesMax: 5 });
    queue.add([file("a"), file("b")]);
    queue.stop(queue.items()[0]?.key ?? "");
    expect(sent[0]?.stopped).toBe(true);
    expect(steps(queue)).toEqual(["a stopped", "b sending"]);
    sent[0]?.end({ ok: true, uploadId: "late" });
    await settle();
    expect(steps(queue)).toEqual(["a stopped", "b sending"]);
    queue.retry(queue.items()[0]?.key ?? "");
    expect(steps(queue)).toEqual(["a waiting", "b sending"]);
  });

  test("tries again where it failed: sending again before, reading again after the bytes are safe", async () => {
    const { queue, sent, asked } = bench();
    queue.add([file("a")]);
    const key = queue.items()[0]?.key ?? "";
    sent[0]?.end({ ok: false, message: "The connection broke.", again: true, signedOut: false });
    await settle();
    expect(queue.items()[0]?.state).toMatchObject({ step: "failed", text: "The connection broke." });
    queue.retry(key);
    expect(sent).toHaveLength(2);
    sent[1]?.end({ ok: true, uploadId: "u" });
    await settle();
    asked[0]?.end({ ok: false, message: "Busy.", signedOut: false });
    await settle();
    queue.retry(key);
    expect(sent).toHaveLength(2);
    expect(asked).toHaveLength(2);
  });

  test("does not send what is empty or too large, and says why", () => {
    const { queue, sent } = bench();
    queue.add([file("none", 0), file("big", 1001)]);
    expect(sent).toHaveLength(0);
    expect(queue.items().map(({ state }) => (state.step === "failed" ? state.text : ""))).toEqual([
      expect.stringMatching(/^The file is empty/),
      expect.stringMatching(/^The file is larger than/),
    ]);
  });

  test("takes no more files at once than allowed and says how many were left out", () => {
    const { queue } = bench();
    expect(queue.add(["a", "b", "c", "d", "e", "f", "g"].map((name) => file(name)))).toBe(2);
    expect(queue.items()).toHaveLength(5);
    expect(queue.add([file("h")])).toBe(1);
  });

  test("takes up files that were sent before and never read, each once", () => {
    const { queue, asked } = bench();
    const before = [{ uploadId: "u1", fileName: "old.gpx", sizeBytes: 5 }];
    queue.addStored(before);
    queue.addStored(before);
    expect(asked.map(({ uploadId }) => uploadId)).toEqual(["u1"]);
    expect(queue.items()).toHaveLength(1);
  });

  test("tags with the setup chosen when the file is read", async () => {
    const { queue, sent, asked } = bench();
    queue.ride("long rail");
    queue.add([file("a")]);
    sent[0]?.end({ ok: true, uploadId: "u" });
    await settle();
    expect(asked[0]?.setupId).toBe("long rail");
    expect(queue.items()[0]?.setupId).toBe("long rail");
  });

  test("announces quarters of all bytes and once what came of it", async () => {
    const { queue, sent, asked } = bench();
    queue.add([file("a", 100), file("b", 300)]);
    expect(announcement(queue.items())).toBe("Sending 2 files.");
    sent[1]?.share(0.5);
    expect(announcement(queue.items())).toBe("25 % of 2 files sent.");
    sent[0]?.end({ ok: true, uploadId: "u-a" });
    await settle();
    expect(announcement(queue.items())).toBe("50 % of 2 files sent.");
    sent[1]?.end({ ok: false, message: "No.", again: false, signedOut: false });
    asked[0]?.end(read);
    await settle();
    expect(isBusy(queue.items())).toBe(false);
    expect(announcement(queue.items())).toBe("2 files: 1 read, 1 not read.");
  });
});
