/** The order in which a request passes. */
import express, { type Express } from "express";
import type { Compute } from "../compute/open-compute.ts";
import { evaluateRoutes, resultRoutes } from "../compute/routes.ts";
import type { Services } from "../services.ts";
import { answerFailure, answerUnknownAddress } from "./failures.ts";
import { healthRoutes } from "./health.ts";
import { measureRequests, metricsRoute } from "./metrics.ts";
import { servePages } from "./pages.ts";
import { createRateLimits } from "./rate-limits.ts";
import { logRequests } from "./request-log.ts";
import { meRoutes } from "./routes/me.ts";
import { signInRoutes } from "./routes/sign-in.ts";
import { notebookRoutes } from "./routes/notebooks.ts";
import { peopleRoutes } from "./routes/people.ts";
import { attachmentRoutes } from "./routes/attachments.ts";
import { refereeLinkRoutes } from "./routes/referee-links.ts";
import { harmless, requireSameSite } from "./same-site.ts";
import { hideReferrer, securityHeaders } from "./security-headers.ts";

export function createApp(services: Services, compute: Compute): Express {
  const { configuration, publicUrl, log, sessions } = services;
  const limits = createRateLimits(configuration.rateLimitFactor);
  const app = express();
  app.set("trust proxy", configuration.trustedProxies);
  app.set("query parser", "simple");
  app.disable("x-powered-by");
  app.use(securityHeaders(publicUrl));
  app.use(healthRoutes(services));
  app.use(metricsRoute(services));
  app.use(measureRequests(services.metrics));
  app.use(logRequests(log));
  app.use(["/api", "/auth"], (_request, response, next) => {
    // What one person may see must not be kept for the next.
    response.setHeader("Cache-Control", "no-store");
    next();
  });
  app.use("/api/referee", hideReferrer);
  app.use(["/api", "/auth"], sessions.middleware);
  // It changes nothing and takes larger bodies than the rest, so it stands before what the rest must pass.
  app.use(evaluateRoutes(services, compute, limits.evaluate));
  app.use(["/api", "/auth"], requireSameSite(publicUrl));
  app.use("/api", (request, response, next) =>
    harmless.has(request.method) ? next() : limits.changes(request, response, next),
  );
  app.use("/api", express.json({ limit: "64kb" }));
  app.use(signInRoutes(services, limits));
  app.use(meRoutes(services));
  app.use(notebookRoutes(services, compute));
  app.use(resultRoutes(services));
  app.use(peopleRoutes(services, limits));
  app.use(refereeLinkRoutes(services, limits));
  app.use(attachmentRoutes(services, limits));
  app.use(["/api", "/auth", "/collab"], answerUnknownAddress);
  app.use(servePages(configuration.clientFolder, publicUrl));
  app.use(answerUnknownAddress);
  app.use(answerFailure);
  return app;
}
