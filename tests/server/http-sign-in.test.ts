import { createHash } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { NotebookList } from "#contract/api.ts";
import { LANTERN_TITLE } from "../../server/commands/lantern-notebook.ts";
import { seedDemonstration } from "../../server/commands/seed-demonstration.ts";
import { TERN_TITLE } from "../../server/commands/tern-notebook.ts";
import { rows } from "../../server/data/database.ts";
import { safeNextPath } from "../../server/http/next-path.ts";
import { askConsent, Browser, signIn } from "./http-browser.ts";
import { createWorld, type World } from "./http-world.ts";

const COOKIE = "subleading";
const sessionCookie = (browser: Browser) => /subleading=([^;]+)/.exec(browser.cookieHeader())?.[1];
/** What the cookie names, without its signature. */
function sessionName(browser: Browser): string {
  return /^s:([^.]+)/.exec(decodeURIComponent(sessionCookie(browser) ?? ""))?.[1] ?? "";
}

describe("signing in", () => {
  let world: World;
  beforeAll(async () => {
    world = await createWorld();
  });
  afterAll(() => world.stop());

  it("knows nobody before", async () => {
    const me = await world.stranger().lookAtMe();
    expect(me).toEqual({ person: null, csrfToken: "", demonstration: { mailboxUrl: world.mailbox.url } });
  });

  it("makes no session for someone who only looks", async () => {
    const browser = world.stranger();
    await browser.get("/api/me");
    expect(browser.cookieHeader()).toBe("");
  });

  it("goes round by the consent page and comes back to where it began", async () => {
    const browser = world.stranger();
    expect(await signIn(browser, "wren-lantern", "/notebooks/1?block=b#here")).toBe(
      "/notebooks/1?block=b#here",
    );
    expect(browser.me?.person).toEqual({
      id: browser.id,
      login: "wren-lantern",
      name: "Wren Lantern",
      email: "wren-lantern@example.org",
      emailVerified: true,
    });
    expect(browser.me?.csrfToken).toMatch(/^[\w-]{43}$/);
  });

  it("takes the same account for the same person", async () => {
    const [one, other] = [await world.signIn("otto-lantern"), await world.signIn("otto-lantern")];
    expect(one.id).toBe(other.id);
    expect(sessionCookie(one)).not.toBe(sessionCookie(other));
  });

  it("makes one person when one new account signs in twice at once", async () => {
    const browsers = [world.stranger(), world.stranger(), world.stranger()];
    await Promise.all(browsers.map((browser) => signIn(browser, "lena-newcomer")));
    expect(new Set(browsers.map(({ id }) => id)).size).toBe(1);
  });

  it("keeps the mark of an address that is not verified", async () => {
    const browser = await world.signIn("mika-unverified");
    expect(browser.me?.person).toMatchObject({ email: "mika-unverified@example.org", emailVerified: false });
  });

  it("sets a cookie that scripts cannot read and other sites cannot send along", async () => {
    const browser = world.stranger();
    const back = await askConsent(browser, "wren-lantern");
    const line = (await browser.get(back)).headers.getSetCookie().join();
    expect(line).toMatch(/HttpOnly/);
    expect(line).toMatch(/SameSite=Lax/);
    expect(line).toMatch(/Path=\//);
    expect(line).not.toMatch(/Secure/);
  });

  it("says so when consent is refused", async () => {
    const browser = world.stranger();
    expect(await signIn(browser, "nora-declines", "/shelf")).toBe("/?sign-in=refused&next=%2Fshelf");
    expect(browser.me?.person).toBeNull();
    expect(await signIn(browser, "")).toBe("/?sign-in=refused");
  });

  it("refuses a state that is not this browser's", async () => {
    const victim = world.stranger();
    await victim.get("/auth/github");
    const back = new URL(await askConsent(world.stranger(), "wren-lantern"));
    const answer = await victim.get(back.href);
    expect(answer.headers.get("location")).toBe("/?sign-in=failed");
    expect((await victim.lookAtMe()).person).toBeNull();
  });

  it("refuses a callback without any state", async () => {
    const browser = world.stranger();
    const back = new URL(await askConsent(browser, "wren-lantern"));
    back.searchParams.delete("state");
    expect((await browser.get(back.href)).headers.get("location")).toBe("/?sign-in=failed");
    expect((await browser.lookAtMe()).person).toBeNull();
  });

  it("takes a code once", async () => {
    const first = world.stranger();
    const back = new URL(await askConsent(first, "wren-lantern"));
    await first.get(back.href);
    const second = world.stranger();
    const own = new URL(await askConsent(second, "otto-lantern"));
    own.searchParams.set("code", back.searchParams.get("code") ?? "");
    expect((await second.get(own.href)).headers.get("location")).toBe("/?sign-in=failed");
    expect((await second.lookAtMe()).person).toBeNull();
    // Going back in the history asks for the same callback again.
    expect((await first.get(back.href)).headers.get("location")).toMatch(/^\/\?sign-in=failed/);
    expect((await first.lookAtMe()).person?.login).toBe("wren-lantern");
  });

  it("gives a session that was planted before a new name", async () => {
    const attacker = world.stranger();
    await attacker.get("/auth/github");
    const planted = sessionCookie(attacker);
    expect(planted).toBeDefined();
    const victim = world.stranger();
    victim.setCookie(COOKIE, planted ?? "");
    await signIn(victim, "wren-lantern");
    expect(victim.me?.person?.login).toBe("wren-lantern");
    expect(sessionCookie(victim)).not.toBe(planted);
    expect((await attacker.lookAtMe()).person).toBeNull();
  });

  it("does not accept a session name that it did not sign", async () => {
    const browser = await world.signIn("wren-lantern");
    const forged = new Browser(world.server.address);
    forged.setCookie(COOKIE, (sessionCookie(browser) ?? "").replace(/\.[^.]*$/, ".AAAA"));
    expect((await forged.lookAtMe()).person).toBeNull();
  });

  it("ends the session on the server at sign-out", async () => {
    const browser = await world.signIn("otto-lantern");
    const stolen = new Browser(world.server.address);
    stolen.setCookie(COOKIE, sessionCookie(browser) ?? "");
    expect((await stolen.lookAtMe()).person?.login).toBe("otto-lantern");
    expect((await browser.post("/auth/sign-out")).status).toBe(204);
    expect((await browser.lookAtMe()).person).toBeNull();
    expect((await stolen.lookAtMe()).person).toBeNull();
  });

  it("announces the end of a session by its digest, never by its name", async () => {
    const browser = await world.signIn("otto-lantern");
    const name = sessionName(browser);
    const heard: string[] = [];
    const forget = world.server.services.accessChanges.onAccessChange((change) => {
      if (change.about === "session") heard.push(change.sessionId);
    });
    await browser.post("/auth/sign-out");
    const digest = createHash("sha256").update(name).digest("base64url");
    await expect.poll(() => heard).toContain(digest);
    forget();
    expect(heard).not.toContain(name);
  });

  it("does not let a session outlive its end", async () => {
    const browser = await world.signIn("ines-tern");
    await rows(
      world.database,
      "update sessions set expire = now() - interval '1 second' where sess->>'personId' = ?",
      [browser.id],
    );
    expect((await browser.lookAtMe()).person).toBeNull();
  });

  it("moves the end of a session on with every request", async () => {
    const browser = await world.signIn("ines-tern");
    await rows(world.database, "update sessions set expire = now() + interval '1 hour' where sid = ?", [
      sessionName(browser),
    ]);
    await browser.get("/api/me");
    const [row] = await rows<{ days: number }>(
      world.database,
      "select extract(day from expire - now())::int as days from sessions where sid = ?",
      [sessionName(browser)],
    );
    expect(row?.days).toBeGreaterThanOrEqual(29);
  });

  it("gives a name that changed hands to its new holder and leaves the rest to the old one", async () => {
    const wren = await world.signIn("wren-lantern");
    await rows(world.database, "update identities set subject = 'given-up' where person_id = ?", [wren.id]);
    const newHolder = await world.signIn("wren-lantern");
    expect(newHolder.id).not.toBe(wren.id);
    expect((await wren.lookAtMe()).person?.login).toMatch(/^wren-lantern~[0-9a-f]{8}$/);
  });

  it("never sends anyone to another site after signing in", async () => {
    for (const next of [
      "//evil.example",
      "https://evil.example/",
      "/\\evil.example",
      "/.//evil.example",
      "/\t/evil.example",
    ])
      expect(await signIn(world.stranger(), "wren-lantern", next), next).toBe("/");
  });
});

describe("where to go after signing in", () => {
  const cases: readonly (readonly [unknown, string])[] = [
    ["/shelf", "/shelf"],
    ["/notebooks/5?a=b#c", "/notebooks/5?a=b#c"],
    ["/r/%2e%2e/x", "/x"],
    ["", "/"],
    [undefined, "/"],
    [["/shelf", "/a"], "/"],
    ["shelf", "/"],
    ["javascript:alert(1)", "/"],
    ["//evil.example/a", "/"],
    ["/\\evil.example", "/"],
    ["/\n/evil.example", "/"],
    ["/a/..//evil.example", "/"],
    ["/%5cevil.example", "/%5cevil.example"],
    ["/auth/github", "/"],
    ["/api/me", "/"],
    [`/${"a".repeat(600)}`, "/"],
  ];
  it.each(cases)("%j leads to %j", (wish, path) => expect(safeNextPath(wish)).toBe(path));
});

describe("a name at the sign-in service", () => {
  const account = { id: 1, email: "a@example.org", emailVerified: true, remark: "", refusesConsent: false };
  it.each([
    ["turns direction", "Ada \u202Eevil\u202C", "Ada evil"],
    ["breaks lines", "Ada\r\nBcc: x\0", "AdaBcc: x"],
    ["is missing", "  ", "the-account"],
    ["goes on for ever", "a".repeat(500), "a".repeat(200)],
  ])("that %s is made fit to show", async (_how, name, shown) => {
    const world = await createWorld({ oauth: { accounts: [{ ...account, login: "the-account", name }] } });
    try {
      expect((await world.signIn("the-account")).me?.person?.name).toBe(shown);
    } finally {
      await world.stop();
    }
  });
});

describe("behind TLS", () => {
  it("keeps the session to TLS and to this very host", async () => {
    const world = await createWorld({
      environment: { PUBLIC_URL: "https://notebooks.example.org" },
      oauth: { callbackUrl: "https://notebooks.example.org/auth/github/callback" },
    });
    const port = (world.server.httpServer.address() as { port: number }).port;
    const browser = new Browser(`http://127.0.0.1:${port}`);
    const answer = await browser.get("/auth/github", { headers: { "x-forwarded-proto": "https" } });
    await world.stop();
    expect(answer.headers.getSetCookie().join()).toMatch(
      /^__Host-subleading=.*Path=\/;.*HttpOnly; Secure; SameSite=Lax$/,
    );
    expect(answer.headers.get("location")).toContain(
      `redirect_uri=${encodeURIComponent("https://notebooks.example.org/auth/github/callback")}`,
    );
  });
});

describe("the shelf of someone new", () => {
  const shelfOf = async (browser: Browser) =>
    (await browser.get<NotebookList>("/api/notebooks")).body.notebooks.map(({ title, role, pinsMoved }) => ({
      title,
      role,
      pinsMoved,
    }));

  it("begins with a copy of each demonstration, made once", async () => {
    const welcoming = await createWorld({ environment: { WELCOME_NOTEBOOKS: "yes" } });
    try {
      const both = [
        { title: LANTERN_TITLE, role: "owner", pinsMoved: 0 },
        { title: TERN_TITLE, role: "owner", pinsMoved: 0 },
      ];
      expect(await shelfOf(await welcoming.signIn("lena-newcomer"))).toEqual(both);
      const again = await welcoming.signIn("lena-newcomer");
      expect(await shelfOf(again)).toEqual(both);
    } finally {
      await welcoming.stop();
    }
  });

  it("has them once for those whom the seeded ones have waited for", async () => {
    const welcoming = await createWorld({ environment: { WELCOME_NOTEBOOKS: "yes" } });
    try {
      await seedDemonstration(welcoming.database);
      expect(await shelfOf(await welcoming.signIn("otto-lantern"))).toEqual([
        { title: LANTERN_TITLE, role: "author", pinsMoved: 0 },
        { title: TERN_TITLE, role: "author", pinsMoved: 0 },
      ]);
    } finally {
      await welcoming.stop();
    }
  });
});
