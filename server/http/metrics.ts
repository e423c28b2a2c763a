/** /metrics: for whoever runs the server. On loopback with no proxy in between, or with the token of the configuration. */
import { timingSafeEqual } from "node:crypto";
import { Router, type Request, type RequestHandler } from "express";
import { refuse } from "../commands/outcome.ts";
import type { Metrics } from "../metrics/metrics.ts";
import type { Services } from "../services.ts";
import { sendProblem } from "./problems.ts";

const loopback = new Set(["127.0.0.1", "::1", "::ffff:127.0.0.1"]);
/** A proxy on this machine comes from loopback too; it says for whom it asks. */
const proxyHeaders = ["x-forwarded-for", "x-forwarded-host", "x-real-ip", "forwarded", "via"];

function mayLook(request: Request, token: string | null, trustedProxies: number): boolean {
  const said = request.get("authorization");
  if (token !== null && said !== undefined) {
    const [mine, theirs] = [Buffer.from(`Bearer ${token}`), Buffer.from(said)];
    return mine.length === theirs.length && timingSafeEqual(mine, theirs);
  }
  const isForwarded = proxyHeaders.some((name) => request.headers[name] !== undefined);
  return trustedProxies === 0 && !isForwarded && loopback.has(request.socket.remoteAddress ?? "");
}

export function metricsRoute({
  configuration,
  metrics,
}: Pick<Services, "configuration" | "metrics">): Router {
  const router = Router();
  router.get("/metrics", (request, response) => {
    if (!mayLook(request, configuration.metricsToken, configuration.trustedProxies))
      return sendProblem(response, refuse("not-found"));
    response.set("Cache-Control", "no-store").type("text/plain; version=0.0.4").send(metrics.text());
  });
  return router;
}

export function measureRequests(metrics: Metrics): RequestHandler {
  const times = metrics.histogram(
    "subleading_request_seconds",
    "Answering requests.",
    [0.005, 0.02, 0.1, 0.5, 2, 10],
  );
  return (request, response, next) => {
    const start = performance.now();
    response.once("finish", () => {
      const status = `${Math.floor(response.statusCode / 100)}xx`;
      const kind = /^\/(?:api|auth)\//.exec(request.originalUrl) === null ? "page" : "api";
      times.observe((performance.now() - start) / 1_000, { kind, status });
    });
    next();
  };
}
