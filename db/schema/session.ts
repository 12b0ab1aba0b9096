import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";
import { upload } from "./upload";
import { user } from "./user";

export const DISCIPLINES = ["downwind", "wing", "other"] as const;

/** One outing on the water. Wind direction is where it comes from, degrees true. Deleted rows wait for undo. */
export const session = sqliteTable(
  "session",
  {
    id: idColumn(),
    ownerId: text("owner_id")
      .notNull()
      .references(() => user.id, { onDelete: "cascade" }),
    uploadId: text("upload_id")
      .notNull()
      .references(() => upload.id),
    /** Name of the entry when the upload is a zip of several; empty otherwise. */
    entryName: text("entry_name").notNull().default(""),
    format: text("format").notNull(),
    title: text("title").notNull(),
    titleIsOwn: integer("title_is_own", { mode: "boolean" }).notNull().default(false),
    spot: text("spot").notNull().default(""),
    discipline: text("discipline", { enum: DISCIPLINES }).notNull(),
    timeZone: text("time_zone").notNull(),
    startMs: integer("start_ms").notNull(),
    endMs: integer("end_ms").notNull(),
    /** Where it began and ended on the water, for titles by place name. Degrees WGS84. */
    startLatDeg: real("start_lat_deg"),
    startLonDeg: real("start_lon_deg"),
    endLatDeg: real("end_lat_deg"),
    endLonDeg: real("end_lon_deg"),
    trimStartMs: integer("trim_start_ms"),
    trimEndMs: integer("trim_end_ms"),
    windFromDeg: real("wind_from_deg"),
    windSpeedMps: real("wind_speed_mps"),
    wavePeriodS: real("wave_period_s"),
    waveHeightM: real("wave_height_m"),
    water: text("water", { enum: ["sea", "bay", "lake", "river"] }),
    notes: text("notes").notNull().default(""),
    visibility: text("visibility", { enum: ["only_me"] })
      .notNull()
      .default("only_me"),
    qualityGrade: text("quality_grade", { enum: ["A", "B", "C", "D"] }).notNull(),
    analysisVersion: integer("analysis_version").notNull(),
    deletedAtMs: integer("deleted_at_ms"),
    createdAtMs: createdAtColumn(),
  },
  (table) => [
    index("session_owner_start").on(table.ownerId, table.startMs),
    // One track of a file becomes one session, however often it is asked for.
    uniqueIndex("session_upload_entry").on(table.uploadId, table.entryName),
  ],
);
