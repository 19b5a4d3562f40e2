import { defineConfig } from "vitest/config";

export default defineConfig({
  test: {
    root: `${import.meta.dirname}/..`,
    include: ["test/**/*.test.ts"],
    benchmark: { include: ["test/bench/**/*.bench.ts"] },
    exclude: ["test/out/**", "node_modules/**", "dist/**"],
    env: { TZ: "UTC" },
    pool: "forks",
    testTimeout: 60_000,
    hookTimeout: 120_000,
  },
});
