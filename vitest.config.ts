import { readFileSync } from "node:fs";
import { defineConfig } from "vitest/config";

const { version } = JSON.parse(readFileSync(new URL("package.json", import.meta.url), "utf8"));

export default defineConfig({
  define: { SITEFOLD_VERSION: JSON.stringify(version) }, // as bin/build.mjs does
  test: {
    include: ["tests/**/*.test.ts"],
    setupFiles: ["tests/setup.ts"],
    testTimeout: 60_000,
    hookTimeout: 120_000,
    isolate: false, // rooms keep no state but caches of pure results; loading them anew for each file took a fifth of a run
    maxWorkers: 2,
  },
});
