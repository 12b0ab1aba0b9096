// Fills an empty data folder with the demo season. Safe to run again.
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import process from "node:process";
import { newId } from "@/db/new-id";
import { prepareDatabase } from "@/db/client";
import { migrateDatabase } from "@/db/migrate";
import { user } from "@/db/schema/user";
import { hashPassword } from "@/lib/server/auth/password";
import type { Context } from "@/lib/server/context/context";
import { database } from "@/lib/server/context/database";
import { demoAccounts } from "@/lib/server/demo/accounts";
import { env } from "@/lib/server/env/env";
import { analysisPool } from "@/lib/server/uploads/analysis-pool";
import { makeSeason } from "./scenario/make-season";
import { RIDERS } from "./scenario/season";

const settings = env();
const marker = path.join(settings.dataDir, "demo-season.json");
const say = (text: string) => process.stdout.write(`${text}\n`);

function markerState(): string | null {
  if (!existsSync(marker)) return null;
  return (JSON.parse(readFileSync(marker, "utf8")) as { state: string }).state;
}

async function addAccount(email: string, weightKg: number): Promise<string> {
  const account = demoAccounts.find((one) => one.email === email);
  if (account === undefined) throw new Error(`no demo account ${email}`);
  const id = newId();
  const passwordHash = await hashPassword(account.password);
  await database().write((tx) =>
    tx.insert(user).values({
      id,
      email,
      name: account.name,
      passwordHash,
      weightKg,
      emailConfirmedAtMs: Date.now(),
      createdAtMs: Date.now(),
    }),
  );
  return id;
}

async function seed(): Promise<void> {
  const db = database();
  await prepareDatabase(db, settings.databaseUrl);
  await migrateDatabase(db, process.cwd());
  if ((await db.read.select({ id: user.id }).from(user).limit(1)).length > 0) {
    throw new Error(`${settings.dataDir} holds an account already. Give the demo an empty DATA_DIR.`);
  }
  writeFileSync(marker, JSON.stringify({ state: "started" }));
  for (const [index, rider] of RIDERS.entries()) {
    const userId = await addAccount(rider.email, rider.weightKg);
    const contextAt = (timeMs: number): Context => ({
      db,
      actor: { kind: "user", userId, authSessionId: "demo" },
      nowMs: () => timeMs,
      requestId: newId(),
      address: null,
    });
    await makeSeason(rider, 1000 + index, contextAt, (done, of) => {
      if (done % 5 === 0 || done === of) say(`  ${rider.email}: ${done} of ${of} sessions`);
    });
  }
  // The accounts stand beside the state, so that a later start can print them without loading the app.
  const accounts = demoAccounts.map(({ name, email, password, role }) => ({ name, email, password, role }));
  writeFileSync(marker, JSON.stringify({ state: "done", accounts }));
}

async function main(): Promise<void> {
  const state = markerState();
  if (state === "done") return;
  if (state === "started") {
    // An earlier run was stopped half-way; the folder is the demo's own, so it is begun anew.
    for (const name of ["trimwake.db", "trimwake.db-wal", "trimwake.db-shm", "files", "demo-season.json"]) {
      rmSync(path.join(settings.dataDir, name), { recursive: true, force: true });
    }
  }
  mkdirSync(settings.dataDir, { recursive: true });
  say("Making the demo season (under a minute, once)");
  await seed();
  await analysisPool().close();
  await database().close();
}

main().catch((error: unknown) => {
  say(error instanceof Error ? error.message : String(error));
  process.exit(1);
});
