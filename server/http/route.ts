/**
 * A route in one glance: who may, what must be sent, what is done, what is answered. The address is checked
 * first, then the right, and the body last, so that someone without the right learns nothing from it.
 */
import type { Request, RequestHandler, Response } from "express";
import * as z from "zod/mini";
import type { $ZodType, output } from "zod/v4/core";
import { idParameter } from "#contract/api.ts";
import { roleMay, type Action } from "#contract/roles.ts";
import type { StoredFile } from "../commands/attachments.ts";
import { refuse, succeed, type Outcome } from "../commands/outcome.ts";
import { findPerson, type KnownPerson } from "../data/people.ts";
import { accessTo, type NotebookAccess } from "../policies/access.ts";
import type { Services } from "../services.ts";
import { sendProblem } from "./problems.ts";
import { check } from "./validation.ts";

export interface Presentation {
  readonly status: number;
  readonly body?: unknown;
  readonly file?: StoredFile;
}
export function present(body: unknown, status = 200): Outcome<Presentation> {
  return succeed({ status, body });
}
/** As something to keep, never as something to show: whatever it holds, no page of ours is made of it. */
export function presentFile(file: StoredFile): Outcome<Presentation> {
  return succeed({ status: 200, file });
}
export function presentNothing(): Outcome<Presentation> {
  return succeed({ status: 204 });
}

const nothing = z.object({});
type Nothing = typeof nothing;

interface Expected<Parameters extends $ZodType, Query extends $ZodType, Body extends $ZodType> {
  readonly parameters?: Parameters;
  readonly query?: Query;
  readonly body?: Body;
}
interface Sent<Parameters extends $ZodType, Query extends $ZodType, Body extends $ZodType> {
  readonly parameters: output<Parameters>;
  readonly query: output<Query>;
  readonly body: output<Body>;
  readonly request: Request;
}
type Perform<Call> = (call: Call) => Promise<Outcome<Presentation>>;

/** Something wrong in an address names nothing that exists. */
function checkParameters<Parameters extends $ZodType>(schema: Parameters, request: Request) {
  const parameters = check(schema, request.params);
  return parameters.ok ? parameters : refuse("not-found");
}

function checkContent<Query extends $ZodType, Body extends $ZodType>(
  query: Query,
  body: Body,
  request: Request,
) {
  const checkedQuery = check(query, request.query);
  if (!checkedQuery.ok) return checkedQuery;
  const sent: unknown = request.body;
  if (body !== (nothing as $ZodType) && sent === undefined) return refuse("unsupported-media");
  const checkedBody = check(body, sent ?? {});
  if (!checkedBody.ok) return checkedBody;
  return succeed({ query: checkedQuery.value, body: checkedBody.value });
}

function answer(response: Response, outcome: Outcome<Presentation>): void {
  if (!outcome.ok) return sendProblem(response, outcome);
  const { status, file } = outcome.value;
  response.status(status);
  if (file) {
    response.attachment(file.name);
    response.type(file.mediaType).send(file.bytes);
  } else if (outcome.value.body === undefined) response.end();
  else response.json(outcome.value.body);
}

async function personOf(services: Services, request: Request): Promise<KnownPerson | null> {
  const { personId } = request.session;
  return personId === undefined ? null : await findPerson(services.database, personId);
}

/** For everyone, signed in or not. */
export function forEveryone<
  Parameters extends $ZodType = Nothing,
  Query extends $ZodType = Nothing,
  Body extends $ZodType = Nothing,
>(
  services: Services,
  expected: Expected<Parameters, Query, Body>,
  perform: Perform<Sent<Parameters, Query, Body> & { readonly person: KnownPerson | null }>,
): RequestHandler {
  const { parameters = nothing, query = nothing, body = nothing } = expected;
  return async (request, response) => {
    const address = checkParameters(parameters, request);
    if (!address.ok) return answer(response, address);
    const content = checkContent(query, body, request);
    if (!content.ok) return answer(response, content);
    const person = await personOf(services, request);
    const sent = { parameters: address.value, ...content.value } as Sent<Parameters, Query, Body>; // defaults are Nothing
    answer(response, await perform({ ...sent, request, person }));
  };
}

/** For anyone who is signed in. */
export function forPeople<
  Parameters extends $ZodType = Nothing,
  Query extends $ZodType = Nothing,
  Body extends $ZodType = Nothing,
>(
  services: Services,
  expected: Expected<Parameters, Query, Body>,
  perform: Perform<Sent<Parameters, Query, Body> & { readonly person: KnownPerson }>,
): RequestHandler {
  const { parameters = nothing, query = nothing, body = nothing } = expected;
  return async (request, response) => {
    const address = checkParameters(parameters, request);
    if (!address.ok) return answer(response, address);
    const person = await personOf(services, request);
    if (person === null) return answer(response, refuse("signed-out"));
    const content = checkContent(query, body, request);
    if (!content.ok) return answer(response, content);
    const sent = { parameters: address.value, ...content.value } as Sent<Parameters, Query, Body>; // defaults are Nothing
    answer(response, await perform({ ...sent, request, person }));
  };
}

/** For those whose role in the notebook `:id` allows one of the actions at least; the command checks finer. */
export function inNotebook<
  Parameters extends $ZodType<{ id: string }> = typeof idParameter,
  Query extends $ZodType = Nothing,
  Body extends $ZodType = Nothing,
>(
  services: Services,
  actions: readonly Action[],
  expected: Expected<Parameters, Query, Body>,
  perform: Perform<
    Sent<Parameters, Query, Body> & { readonly person: KnownPerson; readonly access: NotebookAccess }
  >,
): RequestHandler {
  const { parameters = idParameter, query = nothing, body = nothing } = expected;
  return async (request, response) => {
    const address = checkParameters(parameters as $ZodType<{ id: string }>, request); // the default has an id too
    if (!address.ok) return answer(response, address);
    const person = await personOf(services, request);
    if (person === null) return answer(response, refuse("signed-out"));
    const access = await accessTo(services.database, person.id, address.value.id);
    if (access === null) return answer(response, refuse("not-found"));
    if (!actions.some((action) => roleMay(access.role, action))) return answer(response, refuse("forbidden"));
    const content = checkContent(query, body, request);
    if (!content.ok) return answer(response, content);
    const sent = { parameters: address.value, ...content.value } as Sent<Parameters, Query, Body>; // defaults are Nothing
    answer(response, await perform({ ...sent, request, person, access }));
  };
}
