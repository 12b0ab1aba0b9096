import { blob, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { BumpRide, Lull, OnFoilSegment } from "@/lib/analysis/analysis";
import type { QualityReport } from "@/lib/track/quality";
import { session } from "./session";
import { user } from "./user";

/**
 * The analysed track of a session, one row each, never selected by lists. `series` is the compact binary
 * form of the speed series (lib/track/series-blob), gzip-compressed as it is sent to the client.
 */
export const track = sqliteTable("track", {
  sessionId: text("session_id")
    .primaryKey()
    .references(() => session.id, { onDelete: "cascade" }),
  ownerId: text("owner_id")
    .notNull()
    .references(() => user.id, { onDelete: "cascade" }),
  series: blob("series", { mode: "buffer" }).notNull(),
  segments: text("segments", { mode: "json" }).$type<OnFoilSegment[]>().notNull(),
  bumpRides: text("bump_rides", { mode: "json" }).$type<BumpRide[]>().notNull(),
  lulls: text("lulls", { mode: "json" }).$type<Lull[]>().notNull(),
  quality: text("quality", { mode: "json" }).$type<QualityReport>().notNull(),
  windowStartMs: integer("window_start_ms").notNull(),
  windowEndMs: integer("window_end_ms").notNull(),
  firstFixMs: integer("first_fix_ms").notNull(),
  lastFixMs: integer("last_fix_ms").notNull(),
});
