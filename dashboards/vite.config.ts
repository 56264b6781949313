import { defineConfig } from "vitest/config";

// Where `npm run dev` finds a running service.
const service = process.env["LABWATCH"] ?? "http://127.0.0.1:5080";

export default defineConfig({
  esbuild: { jsx: "automatic", jsxImportSource: "preact" },
  build: {
    target: "es2022",
    // Every file from this host, none inlined: the content security policy allows nothing else.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
    reportCompressedSize: false,
  },
  server: {
    proxy: { "/api": service, "/health": service, "/openapi": service },
  },
  test: { include: ["src/**/*.test.ts"] },
});
