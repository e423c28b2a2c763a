/** GET /api/me */
import { Router } from "express";
import type { Me } from "#contract/api.ts";
import type { Services } from "../../services.ts";
import { forEveryone, present } from "../route.ts";

export function meRoutes(services: Services): Router {
  const router = Router();
  router.get(
    "/api/me",
    forEveryone(services, {}, ({ person, request }) => {
      // Someone signed out has nothing to protect; no session is made for them.
      const csrfToken = person === null ? "" : (request.session.csrfToken ?? "");
      const me: Me = { person, csrfToken, demonstration: services.configuration.demonstration };
      return Promise.resolve(present(me));
    }),
  );
  return router;
}
