/** What went wrong with a request, worded for a person. */
import type { ProblemDetails } from "#contract/api.ts";

export interface Problem {
  /** Stable id: "urn:subleading:…" from the server, or one of ours. */
  readonly code: string;
  /** HTTP status; 0 when there was no answer. */
  readonly status: number;
  readonly sentence: string;
}

export const unreachable: Problem = {
  code: "urn:subleading:unreachable",
  status: 0,
  sentence: "The server could not be reached. Check your connection and try again.",
};

export const signedOut: Problem = {
  code: "urn:subleading:signed-out",
  status: 401,
  sentence: "You are signed out. Sign in again and repeat this.",
};

/** TanStack Query tells failure from success by a throw; this carries the problem through it, and nothing else throws it. */
export class RequestRefused extends Error {
  readonly problem: Problem;
  constructor(problem: Problem) {
    super(problem.sentence);
    this.name = "RequestRefused";
    this.problem = problem;
  }
}

/** The sentence to show for anything a query or mutation may hand back as its error. */
export function sentenceOf(error: unknown): string {
  return error instanceof RequestRefused
    ? error.problem.sentence
    : "Something went wrong on this page. Reload it and try again.";
}

export function isNotFound(error: unknown): boolean {
  return error instanceof RequestRefused && (error.problem.status === 404 || error.problem.status === 403);
}

/** Reads a refusal: problem+json if it is that, else the plain fact of the status. */
export async function readProblem(response: Response): Promise<Problem> {
  const fallback: Problem = {
    code: `urn:subleading:status-${response.status}`,
    status: response.status,
    sentence:
      response.status >= 500
        ? "The server could not do this just now. Try again in a moment."
        : "The server did not accept this request.",
  };
  if (!response.headers.get("content-type")?.includes("application/problem+json")) return fallback;
  let body: unknown;
  try {
    body = await response.json();
  } catch {
    return fallback; // A truncated body: the status is all we know.
  }
  if (!isProblemDetails(body)) return fallback;
  return { code: body.type, status: response.status, sentence: body.detail };
}

function isProblemDetails(body: unknown): body is ProblemDetails {
  return (
    typeof body === "object" &&
    body !== null &&
    "type" in body &&
    typeof body.type === "string" &&
    "detail" in body &&
    typeof body.detail === "string" &&
    body.detail !== ""
  );
}
