/** /api/notebooks/:id/people and /invitations */
import { Router } from "express";
import * as z from "zod/mini";
import { invitationCreate, roleChange, type NotebookPeople } from "#contract/api.ts";
import { changeRole, removePerson } from "../../commands/change-people.ts";
import { invite, withdrawInvitation } from "../../commands/invite.ts";
import { invitationsOfNotebook, peopleOfNotebook } from "../../data/people.ts";
import { roleMay, type Role } from "#contract/roles.ts";
import type { Services } from "../../services.ts";
import type { RateLimits } from "../rate-limits.ts";
import { inNotebook, present, presentNothing } from "../route.ts";

const personParameters = z.object({ id: z.uuid(), personId: z.uuid() });
const invitationParameters = z.object({ id: z.uuid(), invitationId: z.uuid() });

export function peopleRoutes(services: Services, limits: RateLimits): Router {
  const { database, publicUrl } = services;
  const router = Router();

  /** Whom somebody invited, and at which address, is for those who may invite. */
  async function presentPeople(notebookId: string, role: Role) {
    const people: NotebookPeople = {
      people: await peopleOfNotebook(database, notebookId),
      invitations: roleMay(role, "invitation.manage")
        ? await invitationsOfNotebook(database, notebookId)
        : [],
    };
    return present(people);
  }

  router.get(
    "/api/notebooks/:id/people",
    inNotebook(services, ["people.read"], {}, ({ access }) => presentPeople(access.notebookId, access.role)),
  );

  router.put(
    "/api/notebooks/:id/people/:personId",
    inNotebook(
      services,
      ["people.manage"],
      { parameters: personParameters, body: roleChange },
      async ({ person, parameters, body }) => {
        const subject = { notebookId: parameters.id, actorId: person.id, personId: parameters.personId };
        const changed = await changeRole(database, subject, body.role);
        return changed.ok ? presentNothing() : changed;
      },
    ),
  );

  router.delete(
    "/api/notebooks/:id/people/:personId",
    inNotebook(
      services,
      ["people.manage", "people.leave"],
      { parameters: personParameters },
      async ({ person, parameters }) => {
        const subject = { notebookId: parameters.id, actorId: person.id, personId: parameters.personId };
        const removed = await removePerson(database, subject);
        return removed.ok ? presentNothing() : removed;
      },
    ),
  );

  router.post(
    "/api/notebooks/:id/invitations",
    limits.invitations,
    inNotebook(
      services,
      ["invitation.manage"],
      { body: invitationCreate },
      async ({ person, access, body }) => {
        const { notebookId } = access;
        const outcome = await invite(database, { notebookId, inviter: person, ...body, publicUrl });
        return outcome.ok ? present(outcome.value, 201) : outcome;
      },
    ),
  );

  router.delete(
    "/api/notebooks/:id/invitations/:invitationId",
    inNotebook(
      services,
      ["invitation.manage"],
      { parameters: invitationParameters },
      async ({ person, parameters }) => {
        const withdrawn = await withdrawInvitation(
          database,
          person.id,
          parameters.id,
          parameters.invitationId,
        );
        return withdrawn.ok ? presentNothing() : withdrawn;
      },
    ),
  );
  return router;
}
