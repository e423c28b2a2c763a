/** Bodies of the HTTP API. Requests are checked by these schemas on the server; answers carry these types. */
import * as z from "zod/mini";
import type { Evaluation } from "#engine/evaluation.ts";
import { roles, type Role } from "./roles.ts";
import { templateNames } from "./templates.ts";

const title = z.string().check(z.trim(), z.minLength(1), z.maxLength(300));
const uuid = z.uuid();

export interface Person {
  readonly id: string;
  /** Account name at the sign-in service. */
  readonly login: string;
  readonly name: string;
}
export interface Me {
  readonly person: (Person & { readonly email: string | null; readonly emailVerified: boolean }) | null;
  /** Sent back as the header X-CSRF-Token with every request that changes something. */
  readonly csrfToken: string;
  /** Set only when the local sign-in and mail fakes are in use; the interface then says so. */
  readonly demonstration: { readonly mailboxUrl: string | null } | null;
}

export interface NotebookRow {
  readonly id: string;
  readonly title: string;
  readonly role: Role;
  readonly lastChangedAt: string;
  readonly lastChangedBy: string | null;
  readonly people: readonly string[];
  /** "d = 4 · 2 fields · 11 terms", empty before there are premises. */
  readonly premisesLine: string;
  readonly pinsMoved: number;
  readonly pinsLoose: number;
  readonly archivedAt: string | null;
  /** When it was deleted; it can be brought back for 30 days. */
  readonly deletedAt: string | null;
  /** What stands around the searched text in the notebook, when it was found there. */
  readonly excerpt: string | null;
}
export interface NotebookList {
  readonly notebooks: readonly NotebookRow[];
  readonly nextCursor: string | null;
}
export const notebookListQuery = z.object({
  search: z._default(z.string().check(z.maxLength(200)), ""),
  /** "deleted": those one owned, for as long as they can be brought back. */
  show: z._default(z.enum(["current", "archived", "deleted"]), "current"),
  /** Only notebooks with pins that moved or are loose. */
  attention: z._default(z.enum(["any", "moved"]), "any"),
  sort: z._default(z.enum(["changed", "title"]), "changed"),
  cursor: z.optional(z.string().check(z.maxLength(400))),
});
export const notebookCreate = z.strictObject({
  title: z._default(title, "Untitled notebook"),
  template: z._default(z.enum(templateNames), "blank"),
});
export interface Notebook {
  readonly id: string;
  readonly title: string;
  readonly role: Role;
  /** Schema version of the stored document; an editor with a lower one must not open it. */
  readonly schemaVersion: number;
  readonly people: readonly Person[];
  readonly archivedAt: string | null;
}
export const notebookPatch = z.strictObject({
  title: z.optional(title),
  archived: z.optional(z.boolean()),
});

export interface NotebookPeople {
  readonly people: readonly (Person & { readonly role: Role; readonly since: string })[];
  readonly invitations: readonly Invitation[];
}
export interface Invitation {
  readonly id: string;
  /** Account name or e-mail address, as invited. */
  readonly to: string;
  readonly role: Role;
  readonly invitedAt: string;
}
export const roleChange = z.strictObject({ role: z.enum(roles) });
/** `to` is an account name or an e-mail address. */
export const invitationCreate = z.strictObject({
  to: z.string().check(z.trim(), z.minLength(1), z.maxLength(254)),
  role: z.enum(roles),
});
/** Who was found becomes a member at once; who was not gets an invitation that waits. */
export type InvitationOutcome =
  | { readonly outcome: "added"; readonly person: Person }
  | { readonly outcome: "invited"; readonly invitation: Invitation };

export interface RefereeLink {
  readonly id: string;
  readonly name: string;
  readonly hideAuthors: boolean;
  readonly createdAt: string;
  readonly expiresAt: string | null;
  readonly revokedAt: string | null;
  readonly lastOpenedAt: string | null;
}
export const refereeLinkCreate = z.strictObject({
  name: z.string().check(z.trim(), z.minLength(1), z.maxLength(120)),
  expiresAt: z._default(z.nullable(z.iso.datetime({ offset: true })), null),
  hideAuthors: z._default(z.boolean(), false),
});
/** The token is shown once; only its hash is stored. */
export interface RefereeLinkCreated {
  readonly link: RefereeLink;
  readonly token: string;
}

export interface StoredResult {
  readonly blockId: string;
  readonly key: string;
  readonly engineVersion: string;
  readonly evaluation: Evaluation;
  readonly settledAt: string;
  /** Name of the person whose edit led to this result; null when unknown or when authors are hidden. */
  readonly changedBy: string | null;
}
export interface NotebookResults {
  readonly results: readonly StoredResult[];
}

/** What a referee link opens. The document itself follows over the socket, read-only. */
export interface RefereeView {
  readonly notebookId: string;
  readonly title: string;
  /** Null when authors are hidden. */
  readonly authors: readonly string[] | null;
  readonly schemaVersion: number;
  readonly expiresAt: string | null;
  readonly results: readonly StoredResult[];
}

/** RFC 9457 problem details. `type` is a stable id such as "urn:subleading:not-found". */
export interface ProblemDetails {
  readonly type: string;
  readonly title: string;
  readonly status: number;
  /** A sentence a person can act on. */
  readonly detail: string;
}

export const idParameter = z.object({ id: uuid });
