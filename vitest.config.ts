import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

export default defineConfig({
  resolve: { alias: { "@": fileURLToPath(new URL(".", import.meta.url)).replace(/\/$/, "") } },
  test: {
    include: ["tests/**/*.test.{ts,tsx}"],
    exclude: ["tests/end-to-end/**", "node_modules/**"],
    testTimeout: 120_000,
    maxWorkers: 2,
  },
});
