/** /healthz: the process answers. /readyz: it can also reach its database. */
import { Router } from "express";
import { refuse } from "../commands/outcome.ts";
import { rows } from "../data/database.ts";
import type { Services } from "../services.ts";
import { sendProblem } from "./problems.ts";

export function healthRoutes({ database, log }: Pick<Services, "database" | "log">): Router {
  const router = Router();
  router.get("/healthz", (_request, response) => {
    response.json({ status: "alive" });
  });
  router.get("/readyz", async (_request, response) => {
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
