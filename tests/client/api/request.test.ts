import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { ask, readMe } from "../../../client/api/request.ts";
import { sessionHasLapsed, setSessionLapsed } from "../../../client/api/session-state.ts";
import { done, ok, refused, serve, signedIn, signedOut, wren } from "../served.ts";

beforeEach(() => {
  setSessionLapsed(false);
});
afterEach(() => {
  vi.restoreAllMocks();
});

describe("a request", () => {
  it("answers with the body", async () => {
    serve({ "GET /api/notebooks": () => ok({ notebooks: [], nextCursor: null }) });
    expect(await ask("/api/notebooks")).toEqual({ ok: true, value: { notebooks: [], nextCursor: null } });
  });

  it("sends the token of the session with what changes something, and a JSON body", async () => {
    const requests = serve({ "GET /api/me": signedIn, "PATCH /api/notebooks/1": () => ok({}) });
    await readMe();
    await ask("/api/notebooks/1", { method: "PATCH", body: { title: "Two" } });
    expect(requests.at(-1)?.headers.get("x-csrf-token")).toBe("token-1");
    expect(requests.at(-1)?.headers.get("content-type")).toBe("application/json");
    expect(requests.at(-1)?.body).toEqual({ title: "Two" });
  });

  it("takes an empty answer as done", async () => {
    serve({ "GET /api/me": signedIn, "DELETE /api/notebooks/1": () => done });
    expect(await ask("/api/notebooks/1", { method: "DELETE" })).toEqual({ ok: true, value: undefined });
  });

  it("reads the token again and repeats once when the session behind it has changed", async () => {
    let token = "token-1";
    const requests = serve({
      "GET /api/me": () => ok({ person: wren, csrfToken: token, demonstration: null }),
      "DELETE /api/notebooks/1": ({ headers }) =>
        headers.get("x-csrf-token") === "token-2" ? done : refused(403, "cross-site", "Reload the page."),
    });
    await readMe();
    token = "token-2";
    expect((await ask("/api/notebooks/1", { method: "DELETE" })).ok).toBe(true);
    expect(requests.filter(({ method }) => method === "DELETE")).toHaveLength(2);
  });

  it("is refused as signed out when that session has ended meanwhile", async () => {
    serve({
      "GET /api/me": signedOut,
      "DELETE /api/notebooks/1": () => refused(403, "cross-site", "Reload the page."),
    });
    const answer = await ask("/api/notebooks/1", { method: "DELETE" });
    expect(answer).toMatchObject({ ok: false, problem: { code: "urn:subleading:signed-out", status: 401 } });
    expect(sessionHasLapsed()).toBe(true);
  });
});

describe("a failure", () => {
  it("carries the server's own sentence and id", async () => {
    serve({ "GET /api/notebooks/1": () => refused(404, "not-found", "There is nothing here.") });
    expect(await ask("/api/notebooks/1")).toEqual({
      ok: false,
      problem: { code: "urn:subleading:not-found", status: 404, sentence: "There is nothing here." },
    });
  });

  it.each([
    [
      "a page instead of a problem",
      { status: 502, body: "<html>", type: "text/html" },
      /could not do this just now/,
    ],
    [
      "a problem without a sentence",
      { status: 400, body: { type: "x" }, type: "application/problem+json" },
      /did not accept/,
    ],
  ])("is put into words when the answer is %s", async (_what, reply, sentence) => {
    serve({ "GET /api/notebooks": () => reply });
    const answer = await ask("/api/notebooks");
    expect(answer.ok ? "" : answer.problem.sentence).toMatch(sentence);
  });

  it("is put into words when there is no network", async () => {
    vi.spyOn(globalThis, "fetch").mockRejectedValue(new TypeError("network"));
    expect(await ask("/api/notebooks")).toMatchObject({
      ok: false,
      problem: { status: 0, sentence: /could not be reached/ },
    });
  });

  it("of 401 says that the session has lapsed", async () => {
    serve({ "GET /api/notebooks": () => refused(401, "signed-out", "Sign in and try again.") });
    await ask("/api/notebooks");
    expect(sessionHasLapsed()).toBe(true);
  });

  it("is thrown on when nobody waits for the answer any more", async () => {
    const leaving = new AbortController();
    vi.spyOn(globalThis, "fetch").mockRejectedValue(new DOMException("aborted", "AbortError"));
    leaving.abort();
    await expect(ask("/api/notebooks", { signal: leaving.signal })).rejects.toThrow("aborted");
  });
});
