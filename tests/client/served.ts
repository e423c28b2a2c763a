/** Answers the page's requests from a table, as the server would, and remembers what was asked. */
import { vi } from "vitest";

export interface Asked {
  readonly method: string;
  readonly path: string;
  readonly query: URLSearchParams;
  readonly body: unknown;
  readonly headers: Headers;
}
export interface Reply {
  readonly status: number;
  readonly body?: unknown;
  readonly type?: string;
}
/** "GET /api/me" to what is answered; a missing line is answered as the server answers what it does not know. */
export type Lines = Readonly<Record<string, (asked: Asked) => Reply>>;

export const ok = (body: unknown): Reply => ({ status: 200, body });
export const done: Reply = { status: 204 };
export function refused(status: number, code: string, detail: string): Reply {
  return {
    status,
    type: "application/problem+json",
    body: { type: `urn:subleading:${code}`, title: code, status, detail },
  };
}

/** Replaces fetch until the mocks are restored. Returns the list of requests, growing as they come. */
export function serve(lines: Lines): Asked[] {
  const requests: Asked[] = [];
  vi.spyOn(globalThis, "fetch").mockImplementation((input, init) => {
    const url = new URL(input instanceof Request ? input.url : input, "http://localhost");
    const asked: Asked = {
      method: init?.method ?? "GET",
      path: url.pathname,
      query: url.searchParams,
      body: typeof init?.body === "string" ? JSON.parse(init.body) : undefined,
      headers: new Headers(init?.headers),
    };
    requests.push(asked);
    const line = lines[`${asked.method} ${asked.path}`];
    const reply = line
      ? line(asked)
      : refused(404, "not-found", "There is nothing here, or you may not see it.");
    return Promise.resolve(
      new Response(reply.status === 204 ? null : JSON.stringify(reply.body), {
        status: reply.status,
        headers: { "content-type": reply.type ?? "application/json" },
      }),
    );
  });
  return requests;
}

export const wren = {
  id: "00000000-0000-4000-8000-000000000001",
  login: "wren-demo",
  name: "Wren Vale",
  email: "wren@example.test",
  emailVerified: true,
};
export const signedIn = () => ok({ person: wren, csrfToken: "token-1", demonstration: null });
export const signedOut = () => ok({ person: null, csrfToken: "", demonstration: null });
