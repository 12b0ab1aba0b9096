import path from "node:path";
import { migrate } from "drizzle-orm/libsql/migrator";
import type { Database } from "./client";

/**
 * Brings the database to the newest schema. Migrations live in `drizzle/` under the given root and are never
 * edited once landed.
 */
export async function migrateDatabase(database: Database, root: string): Promise<void> {
  await migrate(database.raw, { migrationsFolder: path.join(root, "drizzle") });
}
