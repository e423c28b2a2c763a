/** /healthz: the process answers. /readyz: it can also reach its database, and is not about to stop. */
import { Router } from "express";
import { refuse } from "../commands/outcome.ts";
import { rows } from "../data/database.ts";
import type { Services } from "../services.ts";
import { sendProblem } from "./problems.ts";

export function healthRoutes({
  database,
  log,
  stopping,
}: Pick<Services, "database" | "log" | "stopping">): Router {
  const router = Router();
  router.get("/healthz", (_request, response) => {
    response.json({ status: "alive" });
  });
  router.get("/readyz", async (_request, response) => {
    if (stopping.aborted) return sendProblem(response, refuse("unavailable", "The server is stopping."));
    try {
      await rows(database, "select 1");
      response.json({ status: "ready" });
    } catch (error) {
      log.warn({ err: error }, "the database cannot be reached");
      sendProblem(response, refuse("unavailable"));
    }
  });
  return router;
}
