import path from "node:path";
import { defineConfig } from "vitest/config";

// Time zone dependent output must not differ between machines.
process.env.TZ = "UTC";

const shared = {
  resolve: {
    alias: {
      "@": path.resolve(import.meta.dirname),
    },
  },
};

const project = (name: string, include: string[]) => ({
  ...shared,
  test: {
    name,
    include,
    environment: "node" as const,
    pool: "forks" as const,
    setupFiles: ["tests/support/setup.ts"],
    testTimeout: 60_000,
    hookTimeout: 60_000,
  },
});

export default defineConfig({
  test: {
    projects: [
      project("unit", [
        "lib/**/*.test.ts",
        "db/**/*.test.ts",
        "components/**/*.test.{ts,tsx}",
        "app/**/*.test.ts",
        "scripts/**/*.test.ts",
      ]),
      project("house", ["tests/house/**/*.test.ts"]),
      project("integration", ["tests/integration/**/*.test.ts"]),
      project("golden", ["tests/golden/**/*.test.ts"]),
      project("property", ["tests/property/**/*.test.ts"]),
    ],
  },
});
