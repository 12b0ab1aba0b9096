import { index, integer, primaryKey, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { Figures } from "@/lib/analysis/analysis";
import { DISCIPLINES, session } from "./session";
import { user } from "./user";

/** `spanId` of the row that holds the whole session's figures. */
export const WHOLE_SESSION = "";

/**
 * What lists, comparisons and, later, leaderboards read: one narrow row for the whole session (`spanId` empty)
 * and one for each gear span. Speeds m/s, distances m, times s, shares 0 to 1; null where withheld or not enough data.
 * `figures` holds the whole set for the session page's first paint.
 */
export const sessionFigures = sqliteTable(
  "session_figures",
  {
    sessionId: text("session_id")
      .notNull()
      .references(() => session.id, { onDelete: "cascade" }),
    spanId: text("span_id").notNull(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    setupId: text("setup_id"),
    startMs: integer("start_ms").notNull(),
    discipline: text("discipline", { enum: DISCIPLINES }).notNull(),
    elapsedS: real("elapsed_s").notNull(),
    waterDistanceM: real("water_distance_m").notNull(),
    onFoilDistanceM: real("on_foil_distance_m").notNull(),
    onFoilTimeS: real("on_foil_time_s").notNull(),
    onFoilShare: real("on_foil_share").notNull(),
    takeoffs: integer("takeoffs").notNull(),
    longestSegmentM: real("longest_segment_m").notNull(),
    bumpRidingSpeedMps: real("bump_riding_speed_mps"),
    bumpRides: integer("bump_rides"),
    glideRatio: real("glide_ratio"),
    best2sMps: real("best_2s_mps"),
    best10sMps: real("best_10s_mps"),
    best500mMps: real("best_500m_mps"),
    bestNmMps: real("best_nm_mps"),
    figures: text("figures", { mode: "json" }).$type<Figures>().notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.sessionId, table.spanId] }),
    index("session_figures_owner_start").on(table.ownerId, table.spanId, table.startMs),
    index("session_figures_setup").on(table.setupId),
  ],
);
