import { mkdtempSync, mkdirSync, rmSync, writeFileSync } from "node:fs";
import { request as rawRequest } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { Browser } from "./http-browser.ts";
import { createWorld, type World } from "./http-world.ts";

let folder: string;
let world: World;
let wren: Browser;
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "subleading-page-"));
  mkdirSync(join(folder, "assets"));
  writeFileSync(join(folder, "index.html"), "<!doctype html><title>Page</title>");
  writeFileSync(join(folder, "assets", "main-1a2b3c.js"), "export {};");
  writeFileSync(join(folder, ".secret"), "not for anyone");
  world = await createWorld({ environment: { CLIENT_FOLDER: folder } });
  wren = await world.signIn("wren-lantern");
});
afterAll(async () => {
  await world.stop();
  rmSync(folder, { recursive: true });
});

describe("a request that changes something", () => {
  const create = (browser: Browser, options: Parameters<Browser["post"]>[2]) =>
    browser.post("/api/notebooks", { title: "Forged" }, options);

  it.each([
    ["without the token", { withoutToken: true }],
    ["with another token", { headers: { "x-csrf-token": "A".repeat(43) } }],
    ["with an empty token", { headers: { "x-csrf-token": "" } }],
    ["from another site", { headers: { origin: "https://evil.example" } }],
    ["from a hidden origin", { headers: { origin: "null" } }],
    ["from the same host but another port", { headers: { origin: "http://127.0.0.1:1" } }],
    ["that the browser calls cross-site", { headers: { "sec-fetch-site": "cross-site" } }],
    ["that the browser calls same-site", { headers: { "sec-fetch-site": "same-site" } }],
  ])("is refused %s", async (_how, options) => {
    const answer = await create(wren, options);
    expect([answer.status, answer.body.type]).toEqual([403, "urn:subleading:cross-site"]);
    expect((await wren.get("/api/notebooks?search=Forged")).body.notebooks).toEqual([]);
  });

  it("is refused with the token of someone else's session", async () => {
    const otto = await world.signIn("otto-lantern");
    const answer = await create(wren, { headers: { "x-csrf-token": otto.me?.csrfToken ?? "" } });
    expect(answer.status).toBe(403);
  });

  it("is let through from our own page", async () => {
    const headers = { origin: world.server.address, "sec-fetch-site": "same-origin" };
    const answer = await wren.post("/api/notebooks", { title: "Own" }, { headers });
    expect(answer.status).toBe(201);
  });

  it("cannot sign someone out from elsewhere", async () => {
    expect((await wren.post("/auth/sign-out", undefined, { withoutToken: true })).status).toBe(403);
    expect((await wren.lookAtMe()).person).not.toBeNull();
  });

  it("asks who is signed out to sign in", async () => {
    const answer = await create(world.stranger(), {});
    expect([answer.status, answer.body]).toEqual([
      401,
      {
        type: "urn:subleading:signed-out",
        title: "Signed out",
        status: 401,
        detail: "Sign in and try again.",
      },
    ]);
  });

  it("gives a token that changes with every sign-in", async () => {
    const again = await world.signIn("wren-lantern");
    expect(again.me?.csrfToken).not.toBe(wren.me?.csrfToken);
  });
});

describe("headers", () => {
  const policyOf = (text: string | null) =>
    Object.fromEntries(
      (text ?? "").split(";").map((part) => [part.split(" ")[0], part.split(" ").slice(1).join(" ")]),
    );

  it("let pages run our scripts only, in nobody's frame", async () => {
    const answer = await wren.get("/shelf", { headers: { accept: "text/html" } });
    const policy = policyOf(answer.headers.get("content-security-policy"));
    const { host } = new URL(world.server.address);
    expect(policy).toEqual({
      "default-src": "'self'",
      "script-src": "'self'",
      "script-src-attr": "'none'",
      "worker-src": "'self'",
      "style-src": "'self' 'unsafe-inline'",
      "font-src": "'self' data:",
      "img-src": "'self' data:",
      "connect-src": `'self' ws://${host}`,
      "object-src": "'none'",
      "base-uri": "'none'",
      "form-action": "'self'",
      "frame-ancestors": "'none'",
    });
    expect(answer.headers.get("x-content-type-options")).toBe("nosniff");
    expect(answer.headers.get("x-frame-options")).toBe("DENY");
    expect(answer.headers.get("cross-origin-opener-policy")).toBe("same-origin");
    expect(answer.headers.get("x-powered-by")).toBeNull();
    expect(answer.headers.get("strict-transport-security")).toBeNull();
  });

  it("hide the address of a referee's page from every other site", async () => {
    for (const path of ["/r/some-token", "/api/referee/some-token"]) {
      const answer = await wren.get(path, { headers: { accept: "text/html" } });
      expect(answer.headers.get("referrer-policy"), path).toBe("no-referrer");
      expect(answer.headers.get("x-robots-tag"), path).toBe("noindex, nofollow");
    }
    expect((await wren.get("/shelf")).headers.get("referrer-policy")).toBe("same-origin");
  });

  it("let nothing personal be kept on the way", async () => {
    for (const path of ["/api/me", "/api/notebooks", "/auth/github"])
      expect((await wren.get(path)).headers.get("cache-control"), path).toBe("no-store");
  });

  it("over TLS, ask for TLS from then on", async () => {
    const secure = await createWorld({ environment: { PUBLIC_URL: "https://notebooks.example.org" } });
    const { port } = secure.server.httpServer.address() as { port: number };
    const answer = await new Browser(`http://127.0.0.1:${port}`).get("/healthz");
    await secure.stop();
    const policy = policyOf(answer.headers.get("content-security-policy"));
    expect(policy["upgrade-insecure-requests"]).toBe("");
    expect(policy["connect-src"]).toBe("'self' wss://notebooks.example.org");
    expect(answer.headers.get("strict-transport-security")).toMatch(/max-age=31536000/);
  });
});

describe("pages", () => {
  const page = { headers: { accept: "text/html" } };

  it("answer every address of the router with one page that is asked for afresh", async () => {
    for (const path of ["/", "/shelf", "/notebooks/abc", "/r/token"]) {
      const answer = await wren.get(path, page);
      expect([answer.status, answer.text], path).toEqual([200, "<!doctype html><title>Page</title>"]);
      expect(answer.headers.get("cache-control"), path).toBe("no-cache");
    }
  });

  it.each(["//elsewhere.example/x", "/\\elsewhere.example/x", "///elsewhere.example"])(
    "lead nobody from another loopback name to %s",
    async (path) => {
      const { port } = new URL(wren.home);
      const options = { host: "127.0.0.1", port, path, headers: { host: "[::1]:1", accept: "text/html" } };
      const location = await new Promise<string | undefined>((resolve, reject) => {
        rawRequest(options, (response) => {
          response.resume();
          resolve(response.headers.location);
        })
          .on("error", reject)
          .end();
      });
      expect(location).toMatch(new RegExp(`^http://[a-z0-9.]+:${port}/`));
    },
  );

  it("send hashed files compressed to who can read that", async () => {
    const compressed = await wren.get("/assets/main-1a2b3c.js", { headers: { "accept-encoding": "gzip" } });
    expect(compressed.headers.get("content-encoding")).toBe("gzip");
    expect(compressed.headers.get("content-type")).toBe("text/javascript; charset=utf-8");
    expect(compressed.headers.get("cache-control")).toBe("public, max-age=31536000, immutable");
    const plain = await wren.get("/assets/main-1a2b3c.js", { headers: { "accept-encoding": "identity" } });
    expect(plain.headers.get("content-encoding")).toBeNull();
    expect([compressed.text, plain.text]).toEqual(["export {};", "export {};"]);
    for (const answer of [compressed, plain]) expect(answer.headers.get("vary")).toMatch(/Accept-Encoding/i);
  });

  it("keep hashed files for ever, and miss what is not there", async () => {
    const file = await wren.get("/assets/main-1a2b3c.js");
    expect(file.headers.get("cache-control")).toBe("public, max-age=31536000, immutable");
    const missing = await wren.get("/assets/main-000000.js", page);
    expect([missing.status, missing.headers.get("cache-control")]).toEqual([404, null]);
  });

  it("lead no way out of their folder, nor to hidden files", async () => {
    for (const path of [
      "/../package.json",
      "/assets/..%2f..%2fpackage.json",
      "/%2e%2e/package.json",
      "/.secret",
    ]) {
      const answer = await rawStatus(path);
      // The page is the answer to every unknown address; the router then says that nothing is there.
      if (answer.status === 200) expect(answer.text, path).toBe("<!doctype html><title>Page</title>");
      else expect(answer.text, path).toContain("urn:subleading:");
    }
  });

  it("lead from another name of this machine to the one that cookies belong to", async () => {
    const { port } = new URL(world.server.address);
    const answer = await rawStatus("/shelf?sort=title", { host: `localhost:${port}` });
    expect([answer.status, answer.location]).toEqual([307, `${world.server.address}/shelf?sort=title`]);
    const other = await rawStatus("/shelf", { host: "elsewhere.example" });
    expect([other.status, other.location]).toEqual([200, undefined]);
  });

  /** As it stands: fetch would tidy the path up. */
  function rawStatus(path: string, headers: Record<string, string> = {}) {
    const { hostname, port } = new URL(world.server.address);
    return new Promise<{ status: number; text: string; location: string | undefined }>((resolve, reject) => {
      rawRequest(
        { hostname, port, path, headers: { accept: "application/json, text/html", ...headers } },
        (response) => {
          let text = "";
          response.on("data", (chunk: Buffer) => (text += chunk.toString()));
          response.on("end", () =>
            resolve({ status: response.statusCode ?? 0, text, location: response.headers.location }),
          );
        },
      )
        .on("error", reject)
        .end();
    });
  }
});

describe("addresses nobody answers", () => {
  it.each(["/api/nothing", "/api", "/auth/nothing", "/collab/nothing", "/api/notebooks/a/b/c"])(
    "%s is a problem, not a page",
    async (path) => {
      const answer = await wren.get(path, { headers: { accept: "text/html" } });
      expect([answer.status, answer.body?.type]).toEqual([404, "urn:subleading:not-found"]);
    },
  );

  it("a broken percent escape is the sender's mistake", async () => {
    const answer = await wren.get("/api/referee/%E0%A4%A");
    expect([answer.status, answer.body.type]).toEqual([400, "urn:subleading:malformed"]);
  });
});

describe("health", () => {
  it("tells a living server from a ready one", async () => {
    expect((await wren.get("/healthz")).body).toEqual({ status: "alive" });
    expect((await wren.get("/readyz")).body).toEqual({ status: "ready" });
  });
});

describe("the log", () => {
  it("names requests by an id that the answer carries", async () => {
    const answer = await wren.get("/api/me");
    const id = answer.headers.get("x-request-id") ?? "";
    expect(id).toMatch(/^[0-9a-f-]{36}$/);
    await expect.poll(() => world.logged()).toContain(id);
  });

  it("holds no cookie, token, code, state or referee's address", async () => {
    const { id } = (await wren.post("/api/notebooks", { title: "Logged" })).body;
    const created = await wren.post(`/api/notebooks/${id}/referee-links`, { name: "Journal" });
    const { token } = created.body;
    await wren.get(`/api/referee/${token}`);
    await wren.get(`/API/Referee/${token}`);
    await wren.get(`/R/${token}`, { headers: { accept: "text/html" } });
    await wren.get(`/r/${token}?x=1`, { headers: { accept: "text/html" } });
    await wren.get(`/collab/${id}?referee=${token}`);
    await wren.get(`/auth/github/callback?code=very-secret-code&state=very-secret-state`);
    const last = await wren.get("/api/me");
    await expect.poll(() => world.logged()).toContain(last.headers.get("x-request-id"));
    const logged = world.logged();
    expect(logged).toContain("/api/referee/[hidden]");
    expect(logged).toContain("referee=[hidden]");
    const secrets = [
      token,
      "very-secret",
      wren.me?.csrfToken ?? "",
      decodeURIComponent(wren.cookieHeader())
        .replace(/^subleading=s:/, "")
        .split(".")[0] ?? "",
      world.configuration.sessionSecret,
      world.configuration.github.clientSecret,
      "wren-lantern@example.org",
    ];
    for (const secret of secrets) {
      expect(secret.length).toBeGreaterThan(8);
      expect(logged, secret).not.toContain(secret);
    }
  });
});

describe("too many requests", () => {
  it("are refused in words, per kind, and told when to come back", async () => {
    const strict = await createWorld({ environment: { RATE_LIMIT_FACTOR: "0.1" } });
    try {
      const browser = strict.stranger();
      const guesses: number[] = [];
      for (let guess = 0; guess < 4; guess += 1)
        guesses.push((await browser.get(`/api/referee/${String(guess).repeat(43)}`)).status);
      expect(guesses).toEqual([404, 404, 429, 429]);
      const refused = await browser.get(`/api/referee/${"9".repeat(43)}`);
      expect(refused.body).toMatchObject({ type: "urn:subleading:too-many", status: 429 });
      expect(refused.body.detail).toContain("10 minutes");
      expect(Number(refused.headers.get("retry-after"))).toBeGreaterThan(0);
      const signIns = [];
      for (let attempt = 0; attempt < 5; attempt += 1)
        signIns.push((await browser.get("/auth/github")).status);
      expect(signIns).toEqual([302, 302, 302, 302, 429]);
      expect((await browser.get("/api/me")).status).toBe(200);
    } finally {
      await strict.stop();
    }
  });

  it("are not counted for readers of a good link", async () => {
    const strict = await createWorld({ environment: { RATE_LIMIT_FACTOR: "0.1" } });
    try {
      const owner = await strict.signIn("wren-lantern");
      const { id } = (await owner.post("/api/notebooks", {})).body;
      const { token } = (await owner.post(`/api/notebooks/${id}/referee-links`, { name: "Journal" })).body;
      for (let time = 0; time < 6; time += 1)
        expect((await strict.stranger().get(`/api/referee/${token}`)).status).toBe(200);
    } finally {
      await strict.stop();
    }
  });
});
