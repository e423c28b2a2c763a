import tailwind from "@tailwindcss/vite";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vitest/config";
import { firstPaint } from "./client/app/first-paint-plugin.ts";

const root = import.meta.dirname;

export default defineConfig({
  root: `${root}/client`,
  publicDir: false,
  plugins: [react(), tailwind(), firstPaint()],
  build: {
    outDir: `${root}/dist/client`,
    emptyOutDir: true,
    manifest: true,
    target: "es2022",
    chunkSizeWarningLimit: 900,
  },
  // A kind's computation is a chunk of its own, by whose name the budgets know it.
  worker: {
    format: "es",
    rolldownOptions: {
      output: {
        chunkFileNames({ facadeModuleId, name }) {
          const kind = /engine\/(\w+)\/kind\.ts$/.exec(facadeModuleId ?? "")?.[1];
          return `assets/worker-${kind === undefined ? name : `kind-${kind}`}-[hash].js`;
        },
      },
    },
  },
  test: {
    projects: [
      {
        root,
        test: {
          name: "unit",
          include: ["tests/engine/**/*.test.ts", "tests/published/**/*.test.ts"],
          environment: "node",
          testTimeout: 30_000,
        },
      },
      {
        root,
        plugins: [react()],
        test: {
          name: "client",
          include: ["tests/client/**/*.test.{ts,tsx}"],
          environment: "happy-dom",
          testTimeout: 30_000,
        },
      },
      {
        root,
        test: {
          name: "server",
          include: ["tests/server/**/*.test.ts"],
          environment: "node",
          globalSetup: ["tests/server/global-setup.ts"],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        root,
        test: {
          name: "house",
          include: ["tests/lint/**/*.test.ts"],
          environment: "node",
          testTimeout: 120_000,
        },
      },
    ],
  },
});
