/** The end of the line: addresses nobody answers, and errors nobody expected. */
import type { ErrorRequestHandler, RequestHandler } from "express";
import { refuse, type Refusal } from "../commands/outcome.ts";
import { isDatabaseAway } from "../data/database-away.ts";
import { sendProblem } from "./problems.ts";

export const answerUnknownAddress: RequestHandler = (_request, response) =>
  sendProblem(response, refuse("not-found"));

/** What the body reader and the router throw, by their `type`. */
const requestFaults: Readonly<Record<string, Refusal>> = {
  "entity.too.large": refuse("too-large"),
  "entity.parse.failed": refuse("malformed", "The body is not valid JSON."),
  "encoding.unsupported": refuse("unsupported-media"),
  "charset.unsupported": refuse("unsupported-media"),
  "request.aborted": refuse("malformed"),
  "request.size.invalid": refuse("malformed"),
};

function refusalFor(error: unknown): Refusal {
  if (!(error instanceof Error)) return refuse("unexpected");
  if ("type" in error && typeof error.type === "string") {
    const fault = requestFaults[error.type];
    if (fault !== undefined) return fault;
  }
  // Express says so of an address with a broken percent escape.
  if (error instanceof URIError) return refuse("malformed");
  return refuse(isDatabaseAway(error) ? "unavailable" : "unexpected");
}

export const answerFailure: ErrorRequestHandler = (error: unknown, request, response, next) => {
  const refusal = refusalFor(error);
  if (refusal.code === "unexpected" || refusal.code === "unavailable")
    request.log.error({ err: error }, "a request failed");
  // Half an answer is out already: Express then ends the connection.
  if (response.headersSent) return next(error);
  sendProblem(response, refusal);
};
