import path from "node:path";
import { defineConfig } from "vitest/config";

const root = import.meta.dirname;
const shared = {
  resolve: {
    alias: {
      "@": root,
      // `server-only` throws outside a React server; tests stand in for one.
      "server-only": path.resolve(root, "node_modules/server-only/empty.js"),
    },
  },
};

export default defineConfig({
  ...shared,
  test: {
    projects: [
      {
        ...shared,
        test: { name: "unit", include: ["tests/unit/**/*.test.{ts,tsx}"], testTimeout: 20_000 },
      },
      ...["db", "actions", "routes"].map((name) => ({
        ...shared,
        test: {
          name,
          include: [`tests/${name}/**/*.test.ts`],
          // One database for all: files run one after another.
          fileParallelism: false,
          setupFiles: ["tests/helpers/setup.ts"],
          // It names Next's modules as only a bundler resolves them.
          server: { deps: { inline: ["next-auth"] } },
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      })),
      {
        ...shared,
        test: {
          name: "e2e",
          include: ["tests/e2e/**/*.test.ts"],
          fileParallelism: false,
          testTimeout: 240_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});
