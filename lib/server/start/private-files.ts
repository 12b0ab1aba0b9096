import { chmod, mkdir, open } from "node:fs/promises";
import { fileURLToPath } from "node:url";

const OWNER_ONLY = 0o600;

/** The path in a `file:` URL as libSQL reads it (relative ones too), or null for a server's address. */
function pathOf(databaseUrl: string): string | null {
  if (!databaseUrl.startsWith("file:")) return null;
  if (databaseUrl.startsWith("file://")) return fileURLToPath(databaseUrl);
  return databaseUrl.slice("file:".length).split("?")[0] ?? null;
}

/**
 * Makes the data folder, and the database file out of reach of the machine's other users: it holds addresses and hashes of
 * passwords. SQLite gives its side files the same permissions as the file itself. A folder that is there already keeps the
 * permissions its operator chose.
 */
export async function keepPrivate(databaseUrl: string, dataDir: string): Promise<void> {
  await mkdir(dataDir, { recursive: true, mode: 0o700 });
  const file = pathOf(databaseUrl);
  if (file === null) return;
  // Never open a file that is there: closing it again would drop the locks that SQLite may hold on it in this process
  // (SQLite, How To Corrupt An SQLite Database File, section 2.2).
  const made = await open(file, "wx", OWNER_ONLY).catch(unless("EEXIST"));
  await made?.close();
  for (const name of [file, `${file}-wal`, `${file}-shm`]) {
    // A side file that is not there yet; or a file of another user, who decides about it.
    await chmod(name, OWNER_ONLY).catch(unless("ENOENT", "EPERM"));
  }
}

/** Lets file system errors of the given codes pass as nothing. */
const unless =
  (...codes: string[]) =>
  (error: unknown): undefined => {
    if (error instanceof Error && "code" in error && codes.includes(String(error.code))) return undefined;
    throw error;
  };
