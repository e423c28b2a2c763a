/** /api/notebooks and /api/notebooks/:id */
import { Router } from "express";
import { idParameter, notebookCreate, notebookListQuery, notebookPatch } from "#contract/api.ts";
import { changeNotebook, deleteNotebook } from "../../commands/change-notebook.ts";
import { createNotebook } from "../../commands/create-notebook.ts";
import { restoreNotebook } from "../../commands/deleted-notebooks.ts";
import { duplicateNotebook } from "../../commands/duplicate-notebook.ts";
import { refuse } from "../../commands/outcome.ts";
import { seedNotebook } from "../../commands/seed-notebook.ts";
import type { Compute } from "../../compute/open-compute.ts";
import { findNotebook, listNotebooks } from "../../data/notebooks.ts";
import { accessTo } from "../../policies/access.ts";
import type { Services } from "../../services.ts";
import { forPeople, inNotebook, present, presentNothing } from "../route.ts";

export function notebookRoutes(services: Services, { compact }: Pick<Compute, "compact">): Router {
  const { database } = services;
  const router = Router();

  async function presentNotebook(personId: string, notebookId: string, status = 200) {
    const access = await accessTo(database, personId, notebookId);
    const notebook = access === null ? null : await findNotebook(database, access);
    return notebook === null ? refuse("not-found") : present(notebook, status);
  }

  router.get(
    "/api/notebooks",
    forPeople(services, { query: notebookListQuery }, async ({ person, query }) => {
      const list = await listNotebooks(database, person.id, query);
      return list.ok ? present(list.value) : list;
    }),
  );

  router.post(
    "/api/notebooks",
    forPeople(services, { body: notebookCreate }, async ({ person, body }) => {
      const id = await createNotebook(database, { ...body, personId: person.id, seedNotebook });
      return presentNotebook(person.id, id, 201);
    }),
  );

  router.get(
    "/api/notebooks/:id",
    inNotebook(services, ["notebook.read"], {}, ({ person, access }) =>
      presentNotebook(person.id, access.notebookId),
    ),
  );

  router.patch(
    "/api/notebooks/:id",
    inNotebook(
      services,
      ["notebook.rename", "notebook.archive"],
      { body: notebookPatch },
      async ({ person, access, body }) => {
        const changed = await changeNotebook(database, person.id, access, body);
        return changed.ok ? presentNotebook(person.id, access.notebookId) : changed;
      },
    ),
  );

  router.delete(
    "/api/notebooks/:id",
    inNotebook(services, ["notebook.delete"], {}, async ({ person, access }) => {
      const deleted = await deleteNotebook(database, person.id, access.notebookId);
      return deleted.ok ? presentNothing() : deleted;
    }),
  );

  router.post(
    "/api/notebooks/:id/copies",
    inNotebook(services, ["notebook.read"], {}, async ({ person, access }) => {
      const copy = await duplicateNotebook(database, compact, {
        notebookId: access.notebookId,
        personId: person.id,
      });
      return copy.ok ? presentNotebook(person.id, copy.value, 201) : copy;
    }),
  );

  // Outside `inNotebook`, for which a deleted notebook does not exist.
  router.post(
    "/api/notebooks/:id/restoration",
    forPeople(services, { parameters: idParameter }, async ({ person, parameters }) => {
      const restored = await restoreNotebook(database, person.id, parameters.id);
      return restored.ok ? presentNotebook(person.id, parameters.id) : restored;
    }),
  );
  return router;
}
