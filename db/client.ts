import { createClient, type Client } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";

/** Reads go through this handle; writes through `Database.write`. */
export type Reader = Omit<LibSQLDatabase, "transaction" | "batch" | "insert" | "update" | "delete" | "run">;

/** The handle inside a write: one transaction, all or nothing. */
export type Transaction = Parameters<Parameters<LibSQLDatabase["transaction"]>[0]>[0];

export type Database = {
  readonly read: Reader;
  /**
   * Runs `work` in one transaction, after all writes asked for before it: the file has one writer at a time,
   * and overlapping transactions on it would answer SQLITE_BUSY and stall the process.
   * Never await another `write` inside `work`: it would wait for itself.
   */
  readonly write: <T>(work: (tx: Transaction) => Promise<T>) => Promise<T>;
  /** For migrations, the sign-in adapter and start checks only. */
  readonly raw: LibSQLDatabase;
  readonly client: Client;
  readonly close: () => Promise<void>;
};

/**
 * Opens the database at a libSQL URL (`file:...` or a server's address). One process opens a file, once.
 *
 * @throws LibsqlError when the file cannot be opened.
 */
export function openDatabase(url: string): Database {
  const client = createClient({ url });
  const raw = drizzle(client);
  let tail: Promise<unknown> = Promise.resolve();
  const write = <T>(work: (tx: Transaction) => Promise<T>): Promise<T> => {
    const run = () => raw.transaction(work);
    const result = tail.then(run, run);
    tail = result.catch(() => undefined);
    return result;
  };
  const close = async () => {
    await tail;
    client.close();
  };
  return { read: raw, write, raw, client, close };
}

/**
 * Sets write-ahead logging and asserts what durability rests on: foreign keys on, full synchronisation.
 *
 * @throws Error naming the setting that is not as it must be.
 */
export async function prepareDatabase(database: Database, url: string): Promise<void> {
  if (!url.startsWith("file:")) return;
  await database.client.execute("PRAGMA journal_mode = WAL");
  await expectPragma(database.client, "journal_mode", ["wal"]);
  await expectPragma(database.client, "foreign_keys", [1]);
  await expectPragma(database.client, "synchronous", [2]);
}

async function expectPragma(client: Client, name: string, allowed: readonly unknown[]): Promise<void> {
  const result = await client.execute(`PRAGMA ${name}`);
  const value = result.rows[0]?.[0];
  if (!allowed.includes(value)) throw new Error(`database setting ${name} is ${String(value)}`);
}
