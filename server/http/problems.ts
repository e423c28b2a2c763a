/** Refusals as RFC 9457 problem details. The ids and statuses are stable: clients may rely on them. */
import type { Response } from "express";
import type { ProblemDetails } from "#contract/api.ts";
import type { Refusal, RefusalCode } from "../commands/outcome.ts";

interface ProblemKind {
  readonly status: number;
  readonly title: string;
  readonly detail: string;
}

export const problemKinds: Readonly<Record<RefusalCode, ProblemKind>> = {
  malformed: { status: 400, title: "Malformed request", detail: "The request could not be read." },
  "signed-out": { status: 401, title: "Signed out", detail: "Sign in and try again." },
  "cross-site": {
    status: 403,
    title: "Not from this page",
    detail: "The request did not come from a current page of this site. Reload the page and try again.",
  },
  forbidden: { status: 403, title: "Not allowed", detail: "Your role in this notebook does not allow this." },
  "not-found": { status: 404, title: "Not found", detail: "There is nothing here, or you may not see it." },
  archived: {
    status: 409,
    title: "Archived",
    detail: "The notebook is archived and cannot be changed. Its owner can restore it.",
  },
  "last-owner": {
    status: 409,
    title: "Last owner",
    detail: "A notebook needs an owner. Make someone else owner first.",
  },
  "already-there": { status: 409, title: "Already there", detail: "This person takes part already." },
  gone: { status: 410, title: "No longer open", detail: "This link is no longer open." },
  "too-large": { status: 413, title: "Too large", detail: "The request is larger than the server accepts." },
  "unsupported-media": { status: 415, title: "Not JSON", detail: "Send the body as application/json." },
  invalid: { status: 422, title: "Not valid", detail: "Some of what was sent is not valid." },
  "too-many": { status: 429, title: "Too many requests", detail: "Wait a little and try again." },
  unexpected: {
    status: 500,
    title: "Our mistake",
    detail: "Something went wrong on the server. It was recorded; try again later.",
  },
  unavailable: {
    status: 503,
    title: "Not available",
    detail: "The database cannot be reached at the moment. Try again in a little while.",
  },
};

export function problemDetails(refusal: Refusal): ProblemDetails {
  const kind = problemKinds[refusal.code];
  return {
    type: `urn:subleading:${refusal.code}`,
    title: kind.title,
    status: kind.status,
    detail: refusal.detail ?? kind.detail,
  };
}

export function sendProblem(response: Response, refusal: Refusal): void {
  const problem = problemDetails(refusal);
  response.status(problem.status).type("application/problem+json").send(JSON.stringify(problem));
}
