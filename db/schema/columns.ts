import { integer, text } from "drizzle-orm/sqlite-core";

/** Sortable random id (UUID version 7, RFC 9562), made by the application. */
export const idColumn = () => text("id").primaryKey();

/** UTC epoch milliseconds of the row's making. */
export const createdAtColumn = () => integer("created_at_ms").notNull();
