/** Who did what, in the transaction that does it. */
import type { Queryable } from "./database.ts";

export interface Happening {
  readonly personId: string | null;
  readonly notebookId?: string;
  readonly what:
    | "signed-in"
    | "signed-out"
    | "demonstration-seeded"
    | "notebook-created"
    | "notebook-renamed"
    | "notebook-archived"
    | "notebook-restored"
    | "notebook-deleted"
    | "notebook-undeleted"
    | "role-changed"
    | "person-removed"
    | "person-left"
    | "person-added"
    | "invited"
    | "invitation-withdrawn"
    | "invitation-claimed"
    | "referee-link-created"
    | "referee-link-revoked"
    | "attachment-kept";
  readonly details?: Readonly<Record<string, string | number | boolean | null>>;
}

export async function recordEvent(transaction: Queryable, happening: Happening): Promise<void> {
  await transaction("events").insert({
    person_id: happening.personId,
    notebook_id: happening.notebookId ?? null,
    what: happening.what,
    details: JSON.stringify(happening.details ?? {}),
  });
}
