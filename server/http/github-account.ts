/** Asks the sign-in service who someone is, over passport-github2, and which address of theirs is verified. */
import { Strategy, type StrategyOptions } from "passport-github2";
import * as z from "zod";
import type { Account } from "../commands/sign-in-person.ts";
import type { GitHubEndpoints } from "../configuration.ts";

const PATIENCE_MS = 10_000;
const USER_AGENT = "Subleading";

const emailsSchema = z.array(
  z.object({ email: z.string().max(254), primary: z.boolean(), verified: z.boolean() }),
);
/** What passport-github2 makes of /user. */
const profileSchema = z.object({
  id: z.string().min(1),
  username: z.string().min(1).max(100),
  displayName: z.string().nullish(),
});

type EmailAddress = Pick<Account, "email" | "emailVerified">;

/** passport-github2 drops the `verified` mark, so the addresses are asked for here. */
async function primaryEmail(emailsUrl: string, accessToken: string): Promise<EmailAddress> {
  const response = await fetch(emailsUrl, {
    headers: { authorization: `Bearer ${accessToken}`, accept: "application/json", "user-agent": USER_AGENT },
    signal: AbortSignal.timeout(PATIENCE_MS),
  });
  // The person may withhold the address; they can sign in all the same.
  if (response.status === 403 || response.status === 404) return { email: null, emailVerified: false };
  if (!response.ok)
    throw new Error(`The sign-in service answered ${response.status} when asked for addresses.`);
  const primary = emailsSchema.parse(await response.json()).find((entry) => entry.primary);
  return { email: primary?.email ?? null, emailVerified: primary?.verified ?? false };
}

/** Characters that would break a line, hide text or turn its direction around. */
const unfit = /[\p{Cc}\p{Zl}\p{Zp}\u202A-\u202E\u2066-\u2069]/gu;

async function readAccount(
  endpoints: GitHubEndpoints,
  accessToken: string,
  profile: unknown,
): Promise<Account> {
  const { id, username, displayName } = profileSchema.parse(profile);
  const name = displayName?.replace(unfit, "").trim().slice(0, 200);
  return {
    provider: "github",
    subject: id,
    login: username,
    name: name === undefined || name === "" ? username : name,
    ...(await primaryEmail(endpoints.emailsUrl, accessToken)),
  };
}

type Answered = (...answer: readonly unknown[]) => void;
interface HttpLibrary {
  request(options: unknown): { destroy(): void };
}
/** The parts of passport-oauth2's client that send requests; its types leave them out. */
interface OAuth2Client {
  _executeRequest(library: HttpLibrary, options: unknown, body: unknown, answered: Answered): void;
}

/** The client for codes and profiles waits for ever; a sign-in service that hangs would keep every sign-in hanging. */
function giveUpAfter(patienceMs: number, strategy: Strategy): void {
  const { _oauth2: client } = strategy as unknown as { _oauth2: OAuth2Client }; // see above
  const execute = client._executeRequest.bind(client);
  client._executeRequest = (library, options, body, answered) => {
    const requests: { destroy(): void }[] = [];
    let isOver = false;
    const finish: Answered = (...answer) => {
      if (isOver) return;
      isOver = true;
      clearTimeout(patience);
      answered(...answer);
    };
    const patience = setTimeout(() => {
      finish(new Error("The sign-in service did not answer in time."));
      for (const request of requests) request.destroy();
    }, patienceMs);
    const watched: HttpLibrary = {
      request(wish) {
        const request = library.request(wish);
        requests.push(request);
        return request;
      },
    };
    execute(watched, options, body, finish);
  };
}

export function githubStrategy(
  endpoints: GitHubEndpoints,
  callbackUrl: string,
  patienceMs = PATIENCE_MS,
): Strategy {
  const options = {
    clientID: endpoints.clientId,
    clientSecret: endpoints.clientSecret,
    callbackURL: callbackUrl,
    authorizationURL: endpoints.authorizeUrl,
    tokenURL: endpoints.tokenUrl,
    userProfileURL: endpoints.userUrl,
    userAgent: USER_AGENT,
    // true: a random state is kept in the session and compared on return. The types still ask for a fixed text.
    state: true as unknown as string,
  } satisfies StrategyOptions;
  type Done = (error: unknown, account?: Account) => void;
  const strategy = new Strategy(
    options,
    (accessToken: string, _refreshToken: string, profile: unknown, done: Done) => {
      readAccount(endpoints, accessToken, profile).then(
        (account) => done(null, account),
        (error: unknown) => done(error),
      );
    },
  );
  giveUpAfter(patienceMs, strategy);
  return strategy;
}
