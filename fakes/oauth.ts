/**
 * A local stand-in for GitHub's sign-in: a server of its own with the authorisation-code flow (RFC 6749,
 * section 4.1), GitHub's addresses and GitHub's habit of answering token errors with status 200.
 */
import { timingSafeEqual } from "node:crypto";
import express, { type Request, type Response } from "express";
import { inventedAccounts, type InventedAccount } from "./accounts.ts";
import { consentPage, refusalPage } from "./oauth-pages.ts";
import { pageHeaders, startLocalServer } from "./local-server.ts";
import { Codes, type Access } from "./oauth-codes.ts";

export interface OAuthFakeOptions {
  readonly port?: number;
  readonly clientId?: string;
  readonly clientSecret?: string;
  /** As registered; on loopback any port is accepted, as GitHub does. */
  readonly callbackUrl?: string;
  readonly codeLifetimeMs?: number;
  /** Instead of the usual invented accounts. */
  readonly accounts?: readonly InventedAccount[];
}
export interface OAuthFake {
  readonly url: string;
  readonly clientId: string;
  readonly clientSecret: string;
  /** For GITHUB_OAUTH_URL and GITHUB_API_URL. */
  readonly oauthUrl: string;
  readonly apiUrl: string;
  stop(): Promise<void>;
}

const loopbackNames = new Set(["localhost", "127.0.0.1", "[::1]"]);

function isRegistered(redirectUri: string, callbackUrl: string): boolean {
  if (!URL.canParse(redirectUri)) return false;
  const [asked, registered] = [new URL(redirectUri), new URL(callbackUrl)];
  if (asked.pathname !== registered.pathname || asked.protocol !== registered.protocol) return false;
  if (loopbackNames.has(registered.hostname)) return loopbackNames.has(asked.hostname);
  return asked.host === registered.host;
}

function isSameText(one: string, other: string): boolean {
  const [left, right] = [Buffer.from(one), Buffer.from(other)];
  return left.length === right.length && timingSafeEqual(left, right);
}

/** One text of a query or form, or "". */
function field(source: unknown, name: string): string {
  const value: unknown =
    typeof source === "object" && source !== null ? Reflect.get(source, name) : undefined;
  return typeof value === "string" ? value : "";
}

function returnTo(response: Response, redirectUri: string, answer: Record<string, string>): void {
  const goal = new URL(redirectUri);
  for (const [name, value] of Object.entries(answer)) goal.searchParams.set(name, value);
  response.redirect(302, goal.href);
}

export async function startOAuthFake(options: OAuthFakeOptions = {}): Promise<OAuthFake> {
  const {
    port = 0,
    clientId = "local-client",
    clientSecret = "local-secret",
    callbackUrl = "http://localhost/auth/github/callback",
    codeLifetimeMs = 10 * 60 * 1000,
    accounts = inventedAccounts,
  } = options;
  const codes = new Codes(codeLifetimeMs);
  const app = express();
  app.disable("x-powered-by");
  const form = express.urlencoded({ extended: false });

  /** Never sends anyone to an address that was not registered. */
  function refuseStrangers(source: unknown, response: Response): boolean {
    const strangeClient = field(source, "client_id") !== clientId;
    if (!strangeClient && isRegistered(field(source, "redirect_uri"), callbackUrl)) return false;
    const words = strangeClient
      ? "No application has this client id."
      : "The application did not register this address.";
    response.status(400).set(pageHeaders).send(refusalPage(words));
    return true;
  }

  app.get("/login/oauth/authorize", (request, response) => {
    if (refuseStrangers(request.query, response)) return;
    const asked = ["client_id", "redirect_uri", "scope", "state"].map(
      (name) => [name, field(request.query, name)] as const,
    );
    response.set(pageHeaders).send(consentPage(accounts, Object.fromEntries(asked)));
  });

  app.post("/login/oauth/authorize", form, (request, response) => {
    if (refuseStrangers(request.body, response)) return;
    const redirectUri = field(request.body, "redirect_uri");
    const state = field(request.body, "state");
    const account = accounts.find(({ login }) => login === field(request.body, "account"));
    if (account === undefined || account.refusesConsent) {
      const description = "The user has denied your application access.";
      return returnTo(response, redirectUri, {
        error: "access_denied",
        error_description: description,
        state,
      });
    }
    const code = codes.grant(account, redirectUri, field(request.body, "scope"));
    returnTo(response, redirectUri, { code, state });
  });

  app.post("/login/oauth/access_token", form, (request, response) => {
    const answer = (fields: Record<string, string>) =>
      request.accepts(["urlencoded", "json"]) === "json"
        ? response.json(fields)
        : response.type("application/x-www-form-urlencoded").send(new URLSearchParams(fields).toString());
    const sentSecret = field(request.body, "client_secret");
    if (field(request.body, "client_id") !== clientId || !isSameText(sentSecret, clientSecret))
      return answer({ error: "incorrect_client_credentials" });
    const redirectUri = field(request.body, "redirect_uri");
    const redeemed = codes.redeem(field(request.body, "code"), redirectUri === "" ? null : redirectUri);
    if (redeemed === null) return answer({ error: "bad_verification_code" });
    return answer({ access_token: redeemed.token, token_type: "bearer", scope: redeemed.scope });
  });

  function withAccess(request: Request, response: Response, present: (access: Access) => void): void {
    const [, token] = /^(?:bearer|token) (.+)$/i.exec(request.get("authorization") ?? "") ?? [];
    const access = token === undefined ? null : codes.access(token);
    if (access === null) response.status(401).json({ message: "Bad credentials" });
    else present(access);
  }

  app.get("/api/user", (request, response) =>
    withAccess(request, response, ({ account: { id, login, name } }) =>
      response.json({ id, login, name, email: null, type: "User" }),
    ),
  );

  app.get("/api/user/emails", (request, response) =>
    withAccess(request, response, ({ account, scope }) => {
      if (!/\b(user|user:email)\b/.test(scope)) return response.status(404).json({ message: "Not Found" });
      return response.json([
        // A second address, so that taking the first instead of the primary one shows.
        { email: `${account.login}@old.example.net`, primary: false, verified: true, visibility: null },
        { email: account.email, primary: true, verified: account.emailVerified, visibility: "private" },
      ]);
    }),
  );

  const server = await startLocalServer(app, port);
  return {
    url: server.url,
    clientId,
    clientSecret,
    oauthUrl: `${server.url}/login/oauth`,
    apiUrl: `${server.url}/api`,
    stop: server.stop,
  };
}
