/** Sign-in sessions: kept in PostgreSQL, named by a signed cookie that scripts cannot read. */
import { createHash } from "node:crypto";
import { ServerResponse, type IncomingMessage } from "node:http";
import connectPgSimple from "connect-pg-simple";
import type { Request, RequestHandler, Response } from "express";
import session from "express-session";
import pg from "pg";
import type { Logger } from "pino";
import type { Configuration } from "../configuration.ts";

declare module "express-session" {
  interface SessionData {
    personId: string;
    csrfToken: string;
    /** Where to go after signing in. */
    next: string;
  }
}

export interface Identity {
  /** A digest of the session's name, safe to log and announce; equal for every socket of one session. */
  readonly sessionId: string;
  readonly personId: string;
}
export interface Sessions {
  readonly middleware: RequestHandler;
  readonly cookieName: string;
  /** Who sent this request, outside Express: for sockets before their upgrade. Null when signed out. */
  identify(request: IncomingMessage): Promise<Identity | null>;
  stop(): Promise<void>;
}

const DAY_MS = 24 * 60 * 60 * 1000;
/** Counted from the last request, so only who stays away is signed out. */
const SESSION_LENGTH_MS = 30 * DAY_MS;
const PRUNE_EVERY_S = 15 * 60;

export function digestOfSession(sessionName: string): string {
  return createHash("sha256").update(sessionName).digest("base64url");
}

export function openSessions(configuration: Configuration, publicUrl: string, log: Logger): Sessions {
  const pool = new pg.Pool({
    connectionString: configuration.databaseUrl,
    application_name: "subleading sessions",
    max: 4,
  });
  // Without a listener, a broken idle connection would end the process.
  pool.on("error", (error) => log.warn({ err: error }, "an idle session connection was lost"));
  const Store = connectPgSimple(session);
  const store = new Store({
    pool,
    tableName: "sessions",
    pruneSessionInterval: configuration.environment === "test" ? false : PRUNE_EVERY_S,
    errorLog: (...parts: unknown[]) => log.error({ parts: parts.map(String) }, "the session store failed"),
  });
  const secure = publicUrl.startsWith("https:");
  // The prefix makes browsers refuse a cookie of this name set by a neighbouring host or over plain HTTP.
  const cookieName = secure ? "__Host-subleading" : "subleading";
  const middleware = session({
    store,
    name: cookieName,
    secret: configuration.sessionSecret,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: "lax", secure, path: "/", maxAge: SESSION_LENGTH_MS },
  });
  return {
    middleware,
    cookieName,
    identify: (request) =>
      new Promise((resolve, reject) => {
        // express-session asks of a request no more than Node's own gives, and writes only when the response ends,
        // which this one never does.
        const asRequest = request as Request; // see above
        const response = new ServerResponse(request) as Response; // see above
        void middleware(asRequest, response, (error?: unknown) => {
          if (error !== undefined)
            return reject(error instanceof Error ? error : new Error("the session could not be read"));
          const { personId } = asRequest.session;
          resolve(
            personId === undefined ? null : { sessionId: digestOfSession(asRequest.sessionID), personId },
          );
        });
      }),
    stop: async () => {
      store.close();
      await pool.end();
    },
  };
}
