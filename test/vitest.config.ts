import { defineConfig } from "vitest/config";

/** Everything that needs no editor and no browser. The page, host and workbench suites have runners of their own (test/run.mjs). */
export default defineConfig({
  test: {
    root: new URL("..", import.meta.url).pathname,
    include: ["test/{engine,data,plan,report,reference,house,cli,host,threads,bench}/**/*.test.ts"],
    setupFiles: ["test/setup.ts"],
    testTimeout: 60_000,
    maxWorkers: 2,
  },
});
