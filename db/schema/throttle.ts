import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";

/** Counters behind throttled sign-in, reset and uploads. `key` names what is counted and for whom (hashed). */
export const throttle = sqliteTable("throttle", {
  key: text("key").primaryKey(),
  count: integer("count").notNull(),
  windowStartMs: integer("window_start_ms").notNull(),
  blockedUntilMs: integer("blocked_until_ms").notNull(),
});
