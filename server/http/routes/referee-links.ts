/** /api/notebooks/:id/referee-links for owners, /api/referee/:token for whoever holds a link. */
import { Router } from "express";
import * as z from "zod/mini";
import { refereeLinkCreate } from "#contract/api.ts";
import { createRefereeLink, openRefereeLink, revokeRefereeLink } from "../../commands/referee-links.ts";
import { refereeLinksOf } from "../../data/referee-links.ts";
import type { Services } from "../../services.ts";
import type { RateLimits } from "../rate-limits.ts";
import { forEveryone, inNotebook, present } from "../route.ts";

const linkParameters = z.object({ id: z.uuid(), linkId: z.uuid() });
const tokenParameters = z.object({ token: z.string() });

export function refereeLinkRoutes(services: Services, limits: RateLimits): Router {
  const { database } = services;
  const router = Router();

  router.get(
    "/api/notebooks/:id/referee-links",
    inNotebook(services, ["refereeLink.manage"], {}, async ({ access }) =>
      present(await refereeLinksOf(database, access.notebookId)),
    ),
  );

  router.post(
    "/api/notebooks/:id/referee-links",
    inNotebook(
      services,
      ["refereeLink.manage"],
      { body: refereeLinkCreate },
      async ({ person, access, body }) => {
        const created = await createRefereeLink(database, {
          ...body,
          notebookId: access.notebookId,
          personId: person.id,
        });
        return created.ok ? present(created.value, 201) : created;
      },
    ),
  );

  router.delete(
    "/api/notebooks/:id/referee-links/:linkId",
    inNotebook(
      services,
      ["refereeLink.manage"],
      { parameters: linkParameters },
      async ({ person, parameters }) => {
        const revoked = await revokeRefereeLink(database, person.id, parameters.id, parameters.linkId);
        return revoked.ok ? present(revoked.value) : revoked;
      },
    ),
  );

  router.get(
    "/api/referee/:token",
    limits.refereeGuesses,
    forEveryone(services, { parameters: tokenParameters }, async ({ parameters }) => {
      const view = await openRefereeLink(database, parameters.token);
      return view.ok ? present(view.value) : view;
    }),
  );
  return router;
}
