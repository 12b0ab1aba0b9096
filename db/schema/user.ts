import { integer, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { createdAtColumn, idColumn } from "./columns";

/** A person with an account. `email` is stored trimmed and in lower case; weight is with gear on, kilograms. */
export const user = sqliteTable("user", {
  id: idColumn(),
  email: text("email").notNull().unique(),
  emailConfirmedAtMs: integer("email_confirmed_at_ms"),
  passwordHash: text("password_hash").notNull(),
  name: text("name").notNull(),
  weightKg: real("weight_kg"),
  speedUnit: text("speed_unit", { enum: ["kn", "km/h", "mph", "m/s"] })
    .notNull()
    .default("kn"),
  distanceUnit: text("distance_unit", { enum: ["NM", "km", "mi"] })
    .notNull()
    .default("km"),
  theme: text("theme", { enum: ["system", "light", "dark"] })
    .notNull()
    .default("system"),
  createdAtMs: createdAtColumn(),
});
