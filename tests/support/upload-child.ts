// Stores random files without end until it is killed; says each one's hash once it has been acknowledged.
import { randomBytes, randomInt } from "node:crypto";
import { writeSync } from "node:fs";
import path from "node:path";
import process from "node:process";
import { openDatabase, prepareDatabase } from "@/db/client";
import { diskStorage } from "@/lib/server/storage/disk-storage";
import { replaceStorage } from "@/lib/server/storage/storage";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { testContext } from "@/tests/support/test-database";

const [folder = "", userId = ""] = process.argv.slice(2);
const url = `file:${path.join(folder, "test.db")}`;
const db = openDatabase(url);
await prepareDatabase(db, url);
replaceStorage(diskStorage(folder));
// A clock that runs fast, so that no limit of files an hour is met.
let nowMs = Date.now();
const ctx = testContext(db, { userId, nowMs: () => (nowMs += 3_600_000) });

async function sendForever(): Promise<never> {
  for (;;) {
    const pieces = Array.from({ length: randomInt(1, 6) }, () => randomBytes(randomInt(1, 60_000)));
    const { sha256 } = await receiveUpload(ctx, {
      fileName: "random.bin",
      body: new Blob(pieces.map((piece) => Uint8Array.from(piece))).stream(),
      declaredBytes: null,
    });
    writeSync(1, `${sha256}\n`);
  }
}

writeSync(1, "ready\n");
await Promise.all([sendForever(), sendForever(), sendForever()]);
