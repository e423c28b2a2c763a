/** GET /api/notebooks/:id/results for whoever may read the notebook; POST /api/evaluate for everyone. */
import express, { Router, type RequestHandler } from "express";
import * as z from "zod/mini";
import type { NotebookResults } from "#contract/api.ts";
import { refuse } from "../commands/outcome.ts";
import { storedResults } from "../data/stored-results.ts";
import { forEveryone, inNotebook, present } from "../http/route.ts";
import type { Services } from "../services.ts";
import { ComputeBusy, ComputeTooLarge } from "./compute-pool.ts";
import type { Compute } from "./open-compute.ts";

const LARGEST_FILE = "512kb";

export function resultRoutes(services: Services): Router {
  const router = Router();
  router.get(
    "/api/notebooks/:id/results",
    inNotebook(services, ["notebook.read"], {}, async ({ access }) => {
      const body: NotebookResults = { results: await storedResults(services.database, access.notebookId) };
      return present(body);
    }),
  );
  return router;
}

/**
 * To be mounted after the sessions (the rate is counted by person) and before the parser and the same-site check of
 * the other routes: a file may be larger than their bodies, and a request that changes nothing has no right to borrow.
 */
export function evaluateRoutes(services: Services, compute: Compute, limit: RequestHandler): Router {
  const router = Router();
  router.post(
    "/api/evaluate",
    limit,
    express.json({ limit: LARGEST_FILE }),
    forEveryone(services, { body: z.unknown() }, async ({ body }) => {
      try {
        const { outcome, mistakes } = await compute.evaluateFile(body);
        for (const mistake of mistakes) services.log.error({ mistake }, "a block kind threw");
        if (outcome.ok) return present(outcome.results);
        const sentences = outcome.complaints.map(({ place, message }) => `${place} ${message}`);
        return refuse("invalid", `The file cannot be read: ${sentences.join("; ")}.`);
      } catch (error) {
        if (error instanceof ComputeTooLarge)
          return refuse("too-large", "This takes too much to compute. Send fewer or smaller blocks.");
        if (error instanceof ComputeBusy) return refuse("too-many", "Too much is being computed. Try again.");
        throw error;
      }
    }),
  );
  return router;
}
