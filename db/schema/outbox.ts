import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";

/** Messages on their way: written with the change that caused them, sent afterwards. */
export const outbox = sqliteTable("outbox", {
  id: idColumn(),
  recipient: text("recipient").notNull(),
  subject: text("subject").notNull(),
  body: text("body").notNull(),
  sentAtMs: integer("sent_at_ms"),
  attempts: integer("attempts").notNull().default(0),
  createdAtMs: createdAtColumn(),
});
