import { index, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";
import { user } from "./user";

/** A place name the rider gave; titles and the map use it. Degrees WGS84. */
export const place = sqliteTable(
  "place",
  {
    id: idColumn(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    latDeg: real("lat_deg").notNull(),
    lonDeg: real("lon_deg").notNull(),
    createdAtMs: createdAtColumn(),
  },
  (table) => [index("place_owner").on(table.ownerId)],
);
