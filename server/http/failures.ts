/** The end of the line: addresses nobody answers, and errors nobody expected. */
import type { ErrorRequestHandler, RequestHandler } from "express";
import { refuse, type Refusal } from "../commands/outcome.ts";
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

/** PostgreSQL or the way to it is gone; see its Appendix A for classes 08, 53 and 57. */
function isDatabaseAway(code: string, name: string): boolean {
  return (
    /^(08|53|57P)/.test(code) || ["ECONNREFUSED", "ECONNRESET"].includes(code) || name === "KnexTimeoutError"
  );
}

function refusalFor(error: unknown): Refusal {
  if (!(error instanceof Error)) return refuse("unexpected");
  if ("type" in error && typeof error.type === "string") {
    const fault = requestFaults[error.type];
    if (fault !== undefined) return fault;
  }
  // Express says so of an address with a broken percent escape.
  if (error instanceof URIError) return refuse("malformed");
  const code = "code" in error && typeof error.code === "string" ? error.code : "";
  return isDatabaseAway(code, error.name) ? refuse("unavailable") : refuse("unexpected");
}

export const answerFailure: ErrorRequestHandler = (error: unknown, request, response, next) => {
  const refusal = refusalFor(error);
  if (refusal.code === "unexpected" || refusal.code === "unavailable")
    request.log.error({ err: error }, "a request failed");
  // Half an answer is out already: Express then ends the connection.
  if (response.headersSent) return next(error);
  sendProblem(response, refusal);
};
