/** The stand-ins keep the rules that a real service keeps, so that our side is tried against them. */
import { createTransport } from "nodemailer";
import { afterEach, describe, expect, it } from "vitest";
import { startOAuthFake, type OAuthFake, type OAuthFakeOptions } from "../../fakes/oauth.ts";
import { startSmtpFake } from "../../fakes/smtp.ts";
import { Browser } from "./http-browser.ts";

const callback = "http://localhost:5000/auth/github/callback";

describe("the sign-in stand-in", () => {
  let fake: OAuthFake;
  let browser: Browser;
  async function open(options: OAuthFakeOptions = {}): Promise<void> {
    fake = await startOAuthFake(options);
    browser = new Browser(fake.url);
  }
  afterEach(() => fake.stop());

  const ask = (changes: Record<string, string> = {}) =>
    new URLSearchParams({
      client_id: fake.clientId,
      redirect_uri: callback,
      scope: "user:email",
      state: "a&b=c",
      ...changes,
    });
  const consent = (account: string, changes: Record<string, string> = {}) =>
    browser.post("/login/oauth/authorize", ask({ account, ...changes }));
  async function codeFor(account: string, changes: Record<string, string> = {}): Promise<string> {
    const back = new URL((await consent(account, changes)).headers.get("location") ?? "");
    return back.searchParams.get("code") ?? "";
  }
  async function redeem(code: string, changes: Record<string, string> = {}) {
    const form = new URLSearchParams({
      client_id: fake.clientId,
      client_secret: fake.clientSecret,
      code,
      redirect_uri: callback,
      ...changes,
    });
    return (
      await browser.post("/login/oauth/access_token", form, { headers: { accept: "application/json" } })
    ).body;
  }

  it("says what it is, and that its people are invented", async () => {
    await open();
    const page = await browser.get(`/login/oauth/authorize?${ask().toString()}`);
    expect(page.text).toContain("local stand-in");
    expect(page.text).toContain("Continue as wren-lantern");
    expect(page.text).toContain("Refuse");
  });

  it("sends nobody to an address that was not registered", async () => {
    await open();
    for (const redirect_uri of [
      "https://evil.example/auth/github/callback",
      "http://localhost/other",
      "javascript:1",
      "",
    ]) {
      const page = await browser.get(`/login/oauth/authorize?${ask({ redirect_uri }).toString()}`);
      expect([page.status, page.headers.get("location")], redirect_uri).toEqual([400, null]);
      expect((await consent("wren-lantern", { redirect_uri })).status, redirect_uri).toBe(400);
    }
    expect(
      (await browser.get(`/login/oauth/authorize?${ask({ client_id: "other" }).toString()}`)).status,
    ).toBe(400);
  });

  it("shows what it was given as text, not as markup", async () => {
    await open();
    const page = await browser.get(
      `/login/oauth/authorize?${ask({ state: '"><script>1</script>' }).toString()}`,
    );
    expect(page.text).not.toContain("<script>");
  });

  it("gives the state back as it was", async () => {
    await open();
    const back = new URL((await consent("wren-lantern")).headers.get("location") ?? "");
    expect(back.origin + back.pathname).toBe(callback);
    expect(back.searchParams.get("state")).toBe("a&b=c");
  });

  it("gives a token for a code once, to who knows the secret, for the same address", async () => {
    await open();
    const code = await codeFor("wren-lantern");
    expect(await redeem(code, { client_secret: "wrong" })).toEqual({ error: "incorrect_client_credentials" });
    expect(await redeem(code)).toMatchObject({ token_type: "bearer", scope: "user:email" });
    expect(await redeem(code)).toEqual({ error: "bad_verification_code" });
    const other = await codeFor("wren-lantern");
    expect(await redeem(other, { redirect_uri: "http://localhost:6000/auth/github/callback" })).toEqual({
      error: "bad_verification_code",
    });
    expect(await redeem("guess")).toEqual({ error: "bad_verification_code" });
  });

  it("lets a code grow old", async () => {
    await open({ codeLifetimeMs: -1 });
    expect(await redeem(await codeFor("wren-lantern"))).toEqual({ error: "bad_verification_code" });
  });

  it("refuses for who refuses", async () => {
    await open();
    for (const account of ["nora-declines", "", "nobody"]) {
      const back = new URL((await consent(account)).headers.get("location") ?? "");
      expect([back.searchParams.get("error"), back.searchParams.get("code")]).toEqual([
        "access_denied",
        null,
      ]);
    }
  });

  it("tells who someone is to the holder of their token, and addresses only within the scope", async () => {
    await open();
    const withToken = async (path: string, token: string) =>
      browser.get(path, { headers: { authorization: `Bearer ${token}` } });
    const { access_token } = await redeem(await codeFor("mika-unverified"));
    expect((await withToken("/api/user", access_token)).body).toMatchObject({
      login: "mika-unverified",
      email: null,
    });
    expect((await withToken("/api/user/emails", access_token)).body).toContainEqual({
      email: "mika-unverified@example.org",
      primary: true,
      verified: false,
      visibility: "private",
    });
    const narrow = await redeem(await codeFor("wren-lantern", { scope: "" }));
    expect((await withToken("/api/user/emails", narrow.access_token)).status).toBe(404);
    expect((await withToken("/api/user", "guess")).status).toBe(401);
    expect((await browser.get("/api/user")).status).toBe(401);
  });
});

describe("the mail stand-in", () => {
  it("takes letters and shows them, as text and as JSON", async () => {
    const fake = await startSmtpFake();
    try {
      const transport = createTransport(fake.smtpUrl);
      await transport.sendMail({
        from: "a@example.org",
        to: "b@example.org",
        subject: "Grüße <b>",
        text: "<script>1</script>",
      });
      transport.close();
      const browser = new Browser(fake.url);
      expect((await browser.get("/letters.json")).body.letters).toMatchObject([
        { id: 1, from: "a@example.org", to: "b@example.org", subject: "Grüße <b>" },
      ]);
      expect((await browser.get("/")).text).toContain("Grüße &lt;b&gt;");
      const letter = await browser.get("/letters/1");
      expect(letter.text).toContain("&lt;script&gt;1&lt;/script&gt;");
      expect(letter.text).toContain("sent to nobody");
      expect((await browser.get("/letters/2")).status).toBe(404);
    } finally {
      await fake.stop();
    }
  });
});
