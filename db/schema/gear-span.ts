import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { idColumn } from "./columns";
import { session } from "./session";
import { setup } from "./setup";
import { user } from "./user";

/** From when to when of a session a setup was ridden. Spans of one session never overlap. */
export const gearSpan = sqliteTable(
  "gear_span",
  {
    id: idColumn(),
    sessionId: text("session_id")
      .notNull()
      .references(() => session.id, { onDelete: "cascade" }),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    setupId: text("setup_id")
      .notNull()
      .references(() => setup.id),
    startMs: integer("start_ms").notNull(),
    endMs: integer("end_ms").notNull(),
  },
  (table) => [
    index("gear_span_session").on(table.sessionId, table.startMs),
    index("gear_span_setup").on(table.setupId),
    index("gear_span_owner").on(table.ownerId),
  ],
);
