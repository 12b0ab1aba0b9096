import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { user } from "./user";

/** A single-use link sent by e-mail. `id` is the SHA-256 of the token in the link. */
export const emailToken = sqliteTable(
  "email_token",
  {
    id: text("id").primaryKey(),
    userId: text("user_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    purpose: text("purpose", { enum: ["confirm_email", "reset_password"] }).notNull(),
    email: text("email").notNull(),
    expiresAtMs: integer("expires_at_ms").notNull(),
  },
  (table) => [index("email_token_user").on(table.userId, table.purpose)],
);
