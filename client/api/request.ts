/** One way to the server: typed answers, failures as values, the CSRF token on everything that changes something. */
import type { Me } from "#contract/api.ts";
import { ATTACHMENT_CONTENT_TYPE } from "#contract/attachment-type.ts";
import { readProblem, RequestRefused, signedOut, unreachable, type Problem } from "./problem.ts";
import { currentCsrfToken, rememberCsrfToken, setSessionLapsed } from "./session-state.ts";

export type Answer<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: Problem };
type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

export interface RequestOptions {
  readonly method?: Method;
  readonly body?: unknown;
  /** A file as the body, in place of JSON. */
  readonly bytes?: Blob;
  readonly signal?: AbortSignal;
}

/** The type of the answer is the contract's word (client/contract/api.ts); the server is the one that checks. */
export async function ask<T>(path: string, options: RequestOptions = {}): Promise<Answer<T>> {
  const method = options.method ?? "GET";
  const first = await send<T>(path, method, options);
  if (first.ok || method === "GET" || first.problem.code !== "urn:subleading:cross-site") return first;
  // The session changed since the token was read (signed in again in another tab): read the token once more.
  const renewed = await readMe();
  if (!renewed.ok) return renewed;
  if (renewed.value.person) return send<T>(path, method, options);
  setSessionLapsed(true);
  return { ok: false, problem: signedOut };
}

/** For TanStack Query, which tells failure by a throw. */
export async function askOrThrow<T>(path: string, options?: RequestOptions): Promise<T> {
  const answer = await ask<T>(path, options);
  if (!answer.ok) throw new RequestRefused(answer.problem);
  return answer.value;
}

export async function readMe(signal?: AbortSignal): Promise<Answer<Me>> {
  const answer = await send<Me>("/api/me", "GET", signal ? { signal } : {});
  if (answer.ok) rememberCsrfToken(answer.value.csrfToken);
  return answer;
}

async function send<T>(path: string, method: Method, options: RequestOptions): Promise<Answer<T>> {
  const headers: Record<string, string> = { accept: "application/json, application/problem+json" };
  if (method !== "GET") {
    if (currentCsrfToken() === null) {
      const me = await readMe();
      if (!me.ok) return me;
    }
    headers["x-csrf-token"] = currentCsrfToken() ?? "";
  }
  if (options.body !== undefined) headers["content-type"] = "application/json";
  if (options.bytes) headers["content-type"] = ATTACHMENT_CONTENT_TYPE;
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      headers,
      credentials: "same-origin",
      ...(options.body === undefined ? {} : { body: JSON.stringify(options.body) }),
      ...(options.bytes ? { body: options.bytes } : {}),
      ...(options.signal ? { signal: options.signal } : {}),
    });
  } catch (cause) {
    if (options.signal?.aborted) throw cause; // Nobody waits for this answer any more.
    return { ok: false, problem: unreachable };
  }
  if (!response.ok) {
    if (response.status === 401) setSessionLapsed(true);
    return { ok: false, problem: await readProblem(response) };
  }
  // An empty body is the whole answer of a deletion; T is then void.
  if (response.status === 204) return { ok: true, value: undefined as T };
  try {
    return { ok: true, value: (await response.json()) as T }; // See the contract's note above.
  } catch (cause) {
    if (options.signal?.aborted) throw cause;
    return {
      ok: false,
      problem: { ...unreachable, sentence: "The server's answer arrived incomplete. Try again." },
    };
  }
}
