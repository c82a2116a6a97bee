import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "vite";

export default defineConfig({
  plugins: [tailwindcss(), reactRouter()],
  resolve: { tsconfigPaths: true },
  // Fonts stay files of our own origin: the content security policy allows no data: fonts.
  build: { assetsInlineLimit: 0 },
  // The server is one bundle: Express, queue and pages share one database connection.
  environments: { ssr: { build: { rollupOptions: { input: "./app/serve.server.ts" } } } },
  optimizeDeps: { include: ["video.js/core"] },
});
