import { index, integer, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";
import { part } from "./part";
import { user } from "./user";

/**
 * Parts bolted together with their adjustments: mast position in millimetres forward of the fuselage's
 * reference, shim stack as the signed sum of degrees under the rear wing.
 */
export const setup = sqliteTable(
  "setup",
  {
    id: idColumn(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    frontWingId: text("front_wing_id").references(() => part.id),
    rearWingId: text("rear_wing_id").references(() => part.id),
    fuselageId: text("fuselage_id").references(() => part.id),
    mastId: text("mast_id").references(() => part.id),
    boardId: text("board_id").references(() => part.id),
    handWingId: text("hand_wing_id").references(() => part.id),
    shimSetId: text("shim_set_id").references(() => part.id),
    mastPositionMm: real("mast_position_mm"),
    shimStackDeg: real("shim_stack_deg").notNull().default(0),
    copiedFromId: text("copied_from_id"),
    notes: text("notes").notNull().default(""),
    retiredAtMs: integer("retired_at_ms"),
    createdAtMs: createdAtColumn(),
  },
  (table) => [
    index("setup_owner").on(table.ownerId),
    index("setup_front_wing").on(table.frontWingId),
    index("setup_rear_wing").on(table.rearWingId),
  ],
);
