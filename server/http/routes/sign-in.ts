/** GET /auth/github, its callback, and POST /auth/sign-out. */
import { Router, type Request, type RequestHandler, type Response } from "express";
import { Passport } from "passport";
import { signInPerson, type Account } from "../../commands/sign-in-person.ts";
import { welcomePerson } from "../../commands/welcome-person.ts";
import { recordEvent } from "../../data/events.ts";
import { announceAccessChange } from "../../policies/access-changes.ts";
import type { Services } from "../../services.ts";
import { githubStrategy } from "../github-account.ts";
import { safeNextPath } from "../next-path.ts";
import type { RateLimits } from "../rate-limits.ts";
import { newCsrfToken } from "../same-site.ts";
import { digestOfSession } from "../sessions.ts";

const CALLBACK = "/auth/github/callback";
/** The page says why one is not signed in. */
type Failure = "refused" | "failed";

type SessionStep = "regenerate" | "save" | "destroy";
/** express-session tells by a callback, with an error or with nothing in several spellings. */
function sessionStep(request: Request, step: SessionStep): Promise<void> {
  return new Promise((resolve, reject) => {
    request.session[step]((error: unknown) => {
      if (error instanceof Error) reject(error);
      else resolve();
    });
  });
}

function explainFailure(response: Response, failure: Failure, next: string): void {
  const query = new URLSearchParams({ "sign-in": failure, ...(next === "/" ? {} : { next }) });
  response.redirect(303, `/?${query.toString()}`);
}

/**
 * Sockets opened under the session are closed by whoever holds them. Told only once the session is gone:
 * they look it up again when they hear of it.
 */
async function announceEndOfSession(services: Services, sessionName: string): Promise<void> {
  await announceAccessChange(services.database, {
    about: "session",
    sessionId: digestOfSession(sessionName),
  });
}

async function completeSignIn(services: Services, request: Request, account: Account): Promise<string> {
  const next = safeNextPath(request.session.next);
  const { personId, isNew } = await signInPerson(services.database, account);
  if (isNew && services.configuration.welcomesWithDemonstrations) {
    await welcomePerson(services.database, personId);
  }
  const before = { sessionName: request.sessionID, isSignedIn: request.session.personId !== undefined };
  // A new session name: one that was planted in the browser before must not become a signed-in one.
  await sessionStep(request, "regenerate");
  request.session.personId = personId;
  request.session.csrfToken = newCsrfToken();
  await sessionStep(request, "save");
  if (before.isSignedIn) await announceEndOfSession(services, before.sessionName);
  return next;
}

async function signOut(services: Services, request: Request): Promise<void> {
  const { personId } = request.session;
  const sessionName = request.sessionID;
  await sessionStep(request, "destroy");
  if (personId === undefined) return;
  await announceEndOfSession(services, sessionName);
  await recordEvent(services.database, { personId, what: "signed-out" });
}

export function signInRoutes(services: Services, limits: RateLimits): Router {
  const passport = new Passport();
  passport.use("github", githubStrategy(services.configuration.github, `${services.publicUrl}${CALLBACK}`));
  // The strategy would fetch the addresses itself if it knew the scope, and forget which are verified.
  const toConsent = { session: false, scope: ["user:email"] };
  // passport types what it returns as any.
  const askConsent = passport.authenticate("github", toConsent) as RequestHandler;
  const router = Router();

  router.get("/auth/github", limits.signIn, (request, response, next) => {
    request.session.next = safeNextPath(request.query["next"]);
    askConsent(request, response, next);
  });

  router.get(CALLBACK, limits.signIn, (request, response, next) => {
    const finish = async (error: unknown, account: Account | false | null | undefined) => {
      const goal = safeNextPath(request.session.next);
      if (error !== null && error !== undefined) {
        request.log.warn({ err: error }, "signing in failed");
        return explainFailure(response, "failed", goal);
      }
      if (!account)
        return explainFailure(
          response,
          request.query["error"] === "access_denied" ? "refused" : "failed",
          goal,
        );
      response.redirect(303, await completeSignIn(services, request, account));
    };
    const done = (error: unknown, account: Account | false | null | undefined) =>
      void finish(error, account).catch(next);
    // As above.
    const takeAnswer = passport.authenticate("github", { session: false }, done) as RequestHandler;
    takeAnswer(request, response, next);
  });

  router.post("/auth/sign-out", async (request, response) => {
    await signOut(services, request);
    response.clearCookie(services.sessions.cookieName, { path: "/" });
    response.status(204).end();
  });
  return router;
}
