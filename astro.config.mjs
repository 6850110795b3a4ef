import node from "@astrojs/node";
import react from "@astrojs/react";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "astro/config";

// Origin is checked by the front server for every content type (src/server), so Astro's own,
// narrower check stays off: it would refuse key clients' DELETE without a Content-Type.
export default defineConfig({
  output: "server",
  adapter: node({ mode: "middleware" }),
  integrations: [react(), developmentDatabase()],
  security: { checkOrigin: false },
  trailingSlash: "ignore",
  devToolbar: { enabled: false },
  build: { inlineStylesheets: "never" },
  vite: { plugins: [tailwindcss()] },
  experimental: {
    csp: {
      algorithm: "SHA-256",
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "worker-src 'self'",
        "form-action 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "frame-ancestors 'none'",
      ],
    },
  },
});

/** `npm run dev` has no front server, so the development server starts the database itself. */
function developmentDatabase() {
  return {
    name: "development-database",
    hooks: {
      "astro:server:setup": async ({ server }) => {
        const { startDatabase } = await server.ssrLoadModule("/src/db/database.ts");
        const { readSettings } = await server.ssrLoadModule("/src/lib/settings.ts");
        await startDatabase(readSettings().databaseUrl);
      },
    },
  };
}
