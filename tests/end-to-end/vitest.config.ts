import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

export default defineConfig({
  resolve: { alias: { "@": fileURLToPath(new URL("../..", import.meta.url)).replace(/\/$/, "") } },
  test: {
    root: fileURLToPath(new URL("../..", import.meta.url)),
    include: ["tests/end-to-end/**/*.test.ts"],
    testTimeout: 240_000,
    hookTimeout: 240_000,
    fileParallelism: false,
  },
});
