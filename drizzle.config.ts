import { defineConfig } from "drizzle-kit";

export default defineConfig({
  dialect: "turso",
  schema: "./db/schema/*.ts",
  out: "./drizzle",
  dbCredentials: { url: "file:./data/trimwake.db" },
});
