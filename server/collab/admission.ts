/** Who may open a socket on which notebook: decided from the request alone, before any document is loaded. */
import type { IncomingMessage } from "node:http";
import type { Database } from "../data/database.ts";
import type { Sessions } from "../http/sessions.ts";
import { personWithAccess } from "../policies/access.ts";
import { resolveReferee } from "../policies/referee.ts";
import { rightsOfMember, rightsOfReferee, type Rights, type Visitor } from "./visitor.ts";

export interface AdmissionOptions {
  readonly database: Database;
  readonly sessions: Pick<Sessions, "identify">;
  readonly publicUrl: string;
}
export interface Admitted {
  readonly admitted: true;
  readonly notebookId: string;
  readonly visitor: Visitor;
  readonly rights: Rights;
  /** Of the stored document. */
  readonly storedSchema: number;
  /** Of the editor; 0 when it does not say. */
  readonly editorSchema: number;
  /** When the session or the link ends, as known now. */
  readonly endsAt: Date | null;
}
export type Admission = Admitted | { readonly admitted: false; readonly status: 400 | 401 | 403 | 404 };

const collabPath = /^\/collab\/([0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12})$/;
const refuse = (status: 400 | 401 | 403 | 404): Admission => ({ admitted: false, status });

export async function admit(request: IncomingMessage, options: AdmissionOptions): Promise<Admission> {
  const url = readUrl(request);
  if (url === null) return refuse(400);
  const notebookId = collabPath.exec(url.pathname)?.[1];
  if (notebookId === undefined) return refuse(404);
  // Browsers always say where a page is from; without an Origin nobody's cookie is being borrowed.
  const { origin } = request.headers;
  if (origin !== undefined && origin !== new URL(options.publicUrl).origin) return refuse(403);
  const editorSchema = readSchema(url);
  if (editorSchema === null) return refuse(400);
  const token = url.searchParams.get("referee");
  const decided =
    token === null
      ? await admitMember(request, notebookId, options)
      : await admitReferee(token, notebookId, options);
  return typeof decided === "number"
    ? refuse(decided)
    : { admitted: true, notebookId, editorSchema, ...decided };
}

type Decided = Omit<Admitted, "admitted" | "notebookId" | "editorSchema">;

async function admitMember(
  request: IncomingMessage,
  notebookId: string,
  { sessions, database }: AdmissionOptions,
): Promise<Decided | 401 | 404> {
  const identity = await sessions.identify(request);
  if (identity === null) return 401;
  const { personId, sessionId } = identity;
  const person = await personWithAccess(database, personId, notebookId);
  if (person === undefined) return 401;
  const { access } = person;
  // From outside, a notebook of strangers looks like none.
  if (access === null) return 404;
  return {
    visitor: { as: "member", personId, sessionId, name: person.name },
    rights: rightsOfMember(access.role, access.archived),
    storedSchema: access.schemaVersion,
    endsAt: sessionEnd(request),
  };
}

async function admitReferee(
  token: string,
  notebookId: string,
  { database }: AdmissionOptions,
): Promise<Decided | 403 | 404> {
  const outcome = await resolveReferee(database, token);
  if (outcome.state === "unknown" || outcome.state === "withdrawn") return 404;
  if (outcome.state !== "open") return 403;
  const { access } = outcome;
  if (access.notebookId !== notebookId) return 404;
  return {
    visitor: { as: "referee", refereeLinkId: access.refereeLinkId, hideAuthors: access.hideAuthors },
    rights: rightsOfReferee(access.hideAuthors),
    storedSchema: access.schemaVersion,
    endsAt: access.expiresAt,
  };
}

function readUrl(request: IncomingMessage): URL | null {
  const address = `http://host${request.url ?? "/"}`;
  return URL.canParse(address) ? new URL(address) : null;
}

/** Null when what is said is no version. */
function readSchema(url: URL): number | null {
  const said = url.searchParams.get("schema");
  if (said === null) return 0;
  return /^\d{1,6}$/.test(said) ? Number(said) : null;
}

/** Filled in by the session middleware that `identify` runs. */
export function sessionEnd(request: IncomingMessage): Date | null {
  const { session } = request as { session?: { cookie?: { expires?: Date | null } } }; // see above
  const expires = session?.cookie?.expires;
  return expires instanceof Date ? expires : null;
}
