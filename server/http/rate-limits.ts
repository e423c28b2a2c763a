/** How often is too often. Counted per server process; by person where one is known, by address otherwise. */
import type { Request, RequestHandler } from "express";
import { ipKeyGenerator, rateLimit } from "express-rate-limit";
import { refuse } from "../commands/outcome.ts";
import { sendProblem } from "./problems.ts";

const MINUTE_MS = 60_000;

export interface RateLimits {
  readonly signIn: RequestHandler;
  readonly invitations: RequestHandler;
  readonly evaluate: RequestHandler;
  /** Files, which are large. */
  readonly uploads: RequestHandler;
  /** Only refused tokens count, so readers of a good link are not slowed and guessing is. */
  readonly refereeGuesses: RequestHandler;
  /** Everything else that changes something. */
  readonly changes: RequestHandler;
}

const address = (request: Request) => ipKeyGenerator(request.ip ?? "unknown");
const personOrAddress = (request: Request) => request.session.personId ?? address(request);

export function createRateLimits(factor: number): RateLimits {
  const limiter = (
    most: number,
    minutes: number,
    key: (request: Request) => string,
    onlyRefused = false,
  ): RequestHandler =>
    rateLimit({
      windowMs: minutes * MINUTE_MS,
      limit: Math.max(1, Math.round(most * factor)),
      keyGenerator: key,
      skipSuccessfulRequests: onlyRefused,
      standardHeaders: "draft-7",
      legacyHeaders: false,
      // How many proxies to believe is settled once, in the configuration.
      validate: { xForwardedForHeader: false, trustProxy: false, forwardedHeader: false },
      handler: (_request, response) =>
        sendProblem(
          response,
          refuse(
            "too-many",
            `Too many requests. Wait ${minutes === 1 ? "a minute" : `${minutes} minutes`} and try again.`,
          ),
        ),
    });
  return {
    signIn: limiter(40, 10, address),
    invitations: limiter(60, 60, personOrAddress),
    evaluate: limiter(240, 1, personOrAddress),
    uploads: limiter(40, 10, personOrAddress),
    refereeGuesses: limiter(20, 10, address, true),
    changes: limiter(300, 1, personOrAddress),
  };
}
