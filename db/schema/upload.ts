import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";
import { user } from "./user";

/** What became of one track of an uploaded file, in words for the rider. */
export type UploadVerdict =
  | { kind: "read"; entryName: string; sessionId: string; notes: string[] }
  | { kind: "refused"; entryName: string; code: string; text: string };

/**
 * A raw file as sent: the bytes live in storage under their SHA-256, this row says whose they are.
 * `status`: stored (bytes are safe, not yet analysed), done (verdicts are written).
 */
export const upload = sqliteTable(
  "upload",
  {
    id: idColumn(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    sha256: text("sha256").notNull(),
    sizeBytes: integer("size_bytes").notNull(),
    fileName: text("file_name").notNull(),
    status: text("status", { enum: ["stored", "done"] }).notNull(),
    verdicts: text("verdicts", { mode: "json" }).$type<UploadVerdict[]>().notNull(),
    createdAtMs: createdAtColumn(),
  },
  (table) => [
    uniqueIndex("upload_owner_sha256").on(table.ownerId, table.sha256),
    index("upload_owner_created").on(table.ownerId, table.createdAtMs),
  ],
);
