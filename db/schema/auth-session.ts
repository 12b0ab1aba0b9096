import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { user } from "./user";

/**
 * A sign-in. `id` is the SHA-256 of the random token in the cookie, so a copy of the table signs nobody in.
 * `expiresAt` (seconds) is Lucia's idle end; `absoluteEndMs` is the end that use does not move.
 */
export const authSession = sqliteTable(
  "auth_session",
  {
    id: text("id").primaryKey(),
    userId: text("user_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    expiresAt: integer("expires_at").notNull(),
    absoluteEndMs: integer("absolute_end_ms").notNull(),
    createdAtMs: integer("created_at_ms").notNull(),
    device: text("device").notNull(),
  },
  (table) => [index("auth_session_user").on(table.userId)],
);
