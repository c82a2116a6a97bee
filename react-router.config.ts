import type { Config } from "@react-router/dev/config";

export default {
  ssr: true,
  // The framework compares Origin with the address that reached this process, which behind a TLS proxy is another one, and
  // answers 400. Our own check against PUBLIC_ORIGIN (app/auth/same-origin.server.ts) runs before every action, with 403.
  allowedActionOrigins: ["**"],
  future: {
    v8_middleware: true,
    v8_splitRouteModules: true,
    v8_viteEnvironmentApi: true,
    v8_passThroughRequests: true,
    v8_trailingSlashAwareDataRequests: true,
  },
} satisfies Config;
