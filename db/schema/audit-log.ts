import { index, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";

/** Who did what to which row, written in the transaction of the change. No foreign keys: it outlives its subjects. */
export const auditLog = sqliteTable(
  "audit_log",
  {
    id: idColumn(),
    actorId: text("actor_id").notNull(),
    action: text("action").notNull(),
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id").notNull(),
    detail: text("detail", { mode: "json" }).$type<Record<string, unknown>>().notNull(),
    createdAtMs: createdAtColumn(),
  },
  (table) => [index("audit_log_subject").on(table.subjectKind, table.subjectId)],
);
