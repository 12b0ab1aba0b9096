import { getTableColumns, getTableName, is } from "drizzle-orm";
import { SQLiteTable } from "drizzle-orm/sqlite-core";
import { readdirSync } from "node:fs";
import path from "node:path";
import type { Database } from "@/db/client";
import { place } from "@/db/schema/place";
import { newId } from "@/db/new-id";
import type { Context } from "@/lib/server/context/context";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { makeAccount, signedIn } from "./accounts";
import { makeSetup } from "./gear-rows";
import { makeSession } from "./session-rows";
import { root } from "./sources";
import { TEST_NOW_MS } from "./test-database";

/** The bytes that the owner has uploaded and the stranger sends again. */
export const OWN_BYTES = "<gpx>only the owner sent this</gpx>";

/** One rider with a row of everything, and a second one who has nothing to do with the first. */
export type AccessWorld = {
  readonly owner: Context;
  readonly stranger: Context;
  readonly strangerSetupId: string;
  readonly strangerUploadId: string;
  readonly strangerWingId: string;
  readonly ids: Readonly<
    Record<"user" | "part" | "setup" | "session" | "upload" | "span" | "place" | "signIn", string>
  >;
  readonly ownerEmail: string;
};

export const bodyOf = (text: string): ReadableStream<Uint8Array> => new Blob([text]).stream();

export async function makeAccessWorld(db: Database): Promise<AccessWorld> {
  const ownerEmail = `owner-${newId()}@riders.example`;
  const strangerEmail = `stranger-${newId()}@riders.example`;
  const user = await makeAccount(db, { email: ownerEmail });
  await makeAccount(db, { email: strangerEmail });
  const { ctx: owner } = await signedIn(db, ownerEmail);
  const { ctx: stranger } = await signedIn(db, strangerEmail);
  const { wing, setup } = await makeSetup(owner, "Owner's setup");
  const own = await makeSetup(stranger, "Stranger's setup");
  const session = await makeSession(db, user.id, {
    startMs: TEST_NOW_MS - 86_400_000,
    overrides: { spot: "Owner's spot", title: "Owner's title", titleIsOwn: true },
  });
  const spans = await setGearSpans(owner, session.id, [{ setupId: setup.id, startMs: null, endMs: null }]);
  const placeId = newId();
  await db.write((tx) =>
    tx.insert(place).values({
      id: placeId,
      ownerId: user.id,
      name: "Owner's launch",
      latDeg: 57.1,
      lonDeg: 9.3,
      createdAtMs: TEST_NOW_MS,
    }),
  );
  const file = { fileName: "own.gpx", declaredBytes: null };
  const { uploadId } = await receiveUpload(owner, { ...file, body: bodyOf(OWN_BYTES) });
  const theirs = await receiveUpload(stranger, { ...file, body: bodyOf("the stranger's own bytes") });
  return {
    owner,
    stranger,
    strangerSetupId: own.setup.id,
    strangerWingId: own.wing.id,
    strangerUploadId: theirs.uploadId,
    ownerEmail,
    ids: {
      user: user.id,
      part: wing.id,
      setup: setup.id,
      session: session.id,
      upload: uploadId,
      span: spans[0]?.id ?? "",
      place: placeId,
      signIn: owner.actor.kind === "user" ? owner.actor.authSessionId : "",
    },
  };
}

/** Every table that says whose its rows are, with that column's name in the database. */
async function ownedTables(): Promise<{ table: string; column: string }[]> {
  const found: { table: string; column: string }[] = [];
  for (const file of readdirSync(path.join(root, "db", "schema"))) {
    const loaded = (await import(/* @vite-ignore */ `${root}/db/schema/${file}`)) as Record<string, unknown>;
    for (const one of Object.values(loaded)) {
      if (!is(one, SQLiteTable)) continue;
      const columns = Object.values(getTableColumns(one)).map((column) => column.name);
      const table = getTableName(one);
      const column = table === "user" ? "id" : columns.find((name) => /^(owner|user)_id$/.test(name));
      if (column !== undefined) found.push({ table, column });
    }
  }
  return found;
}

/** All that belongs to a user, as text: equal before and after means that nothing of it was touched. */
export async function belongings(db: Database, userId: string): Promise<string> {
  const parts: string[] = [];
  for (const { table, column } of await ownedTables()) {
    const { rows } = await db.client.execute({
      sql: `SELECT * FROM "${table}" WHERE "${column}" = ? ORDER BY 1, 2`,
      args: [userId],
    });
    parts.push(`${table} ${JSON.stringify(rows.map((row) => Object.values(row).map(String)))}`);
  }
  return parts.join("\n");
}
