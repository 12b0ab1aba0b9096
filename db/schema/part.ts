import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { PART_KINDS } from "@/lib/gear/dimension-fields";
import { createdAtColumn, idColumn } from "./columns";
import { user } from "./user";

/** A thing that can be bolted on. `dimensions` is validated per kind by lib/gear (SI units in its names). */
export const part = sqliteTable(
  "part",
  {
    id: idColumn(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    kind: text("kind", { enum: PART_KINDS }).notNull(),
    maker: text("maker").notNull(),
    model: text("model").notNull(),
    dimensions: text("dimensions", { mode: "json" })
      .$type<Record<string, number | string | null>>()
      .notNull(),
    notes: text("notes").notNull().default(""),
    retiredAtMs: integer("retired_at_ms"),
    createdAtMs: createdAtColumn(),
  },
  (table) => [index("part_owner").on(table.ownerId, table.kind)],
);
