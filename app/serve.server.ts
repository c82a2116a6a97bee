import { createRequestHandler } from "@react-router/express";
import compression from "compression";
import express from "express";
import helmet from "helmet";
import { RateLimiterMemory } from "rate-limiter-flexible";
import { refuseDemoAccounts } from "./auth/demo-accounts.server";
import { taskHandlers } from "./background.server";
import { database } from "./db.server";
import { env } from "./env.server";
import { startQueue } from "./queue/run-tasks.server";

function start(): void {
  const { PORT, PUBLIC_ORIGIN } = env();
  database();
  refuseDemoAccounts(database().db, env());

  const app = express();
  app.disable("x-powered-by");
  app.use(compression());
  app.use(
    helmet({
      contentSecurityPolicy: false, // set with a nonce for each page in entry.server
      strictTransportSecurity: PUBLIC_ORIGIN.startsWith("https:"),
      crossOriginEmbedderPolicy: false,
      referrerPolicy: { policy: "same-origin" },
    }),
  );
  app.use("/assets", express.static("build/client/assets", { immutable: true, maxAge: "1y" }));
  app.use(express.static("build/client", { maxAge: "1h" }));

  // Per address of the visitor; the tries for one account are counted in the sign-in itself.
  const doors = new RateLimiterMemory({ points: 300, duration: 15 * 60 });
  app.post(
    ["/sign-in", "/sign-up", "/forgot-password", "/reset-password/:token", "/invitation/:token"],
    (request, response, next) => {
      doors.consume(request.ip ?? "unknown").then(
        () => next(),
        () =>
          response
            .status(429)
            .type("text/plain")
            .send("Too many tries from this address. Wait 15 minutes and try again."),
      );
    },
  );

  app.all(
    "*splat",
    createRequestHandler({ build: () => import("virtual:react-router/server-build"), mode: env().NODE_ENV }),
  );

  const queue = startQueue(database().db, taskHandlers);
  const server = app.listen(PORT, (error) => {
    if (error) throw error;
    console.log(`Castlenut listens on port ${PORT} for ${PUBLIC_ORIGIN}`);
  });

  const stop = () => {
    server.closeIdleConnections();
    server.close(() => {
      void queue.stop().then(() => {
        database().close();
        process.exit(0);
      });
    });
    setTimeout(() => process.exit(0), 10_000).unref();
  };
  process.once("SIGINT", stop);
  process.once("SIGTERM", stop);
}

try {
  start();
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
}
