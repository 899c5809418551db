import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

const root = fileURLToPath(new URL(".", import.meta.url));

export default defineConfig({
  resolve: { alias: { "@": root, "server-only": `${root}lib/local/server-only.ts` } },
  test: { include: ["tests/unit/**/*.test.ts", "tests/unit/**/*.test.tsx"], exclude: ["node_modules"] },
});
