/** One line per request, with an id the answer carries too, and without anything that opens a door. */
import { randomUUID } from "node:crypto";
import type { IncomingMessage, ServerResponse } from "node:http";
import pino, { type DestinationStream, type Logger } from "pino";
import { pinoHttp } from "pino-http";
import type { Configuration } from "../configuration.ts";

/** Referee tokens in paths; tokens, OAuth codes and states in queries. */
export function withoutSecrets(address: string): string {
  return address
    .replace(/(\/r\/|\/api\/referee\/)[^/?#]+/gi, "$1[hidden]")
    .replace(/([?&](?:referee|code|state|token|access_token)=)[^&#]*/gi, "$1[hidden]");
}

/** An error's own words, without the request, the bindings or the row that a library may hang on it. */
function describeError(error: unknown): object {
  if (!(error instanceof Error)) return { message: String(error) };
  const code = "code" in error && typeof error.code === "string" ? error.code : undefined;
  return {
    type: error.name,
    message: withoutSecrets(error.message),
    stack: withoutSecrets(error.stack ?? ""),
    ...(code === undefined ? {} : { code }),
  };
}

export function openLog(
  configuration: Pick<Configuration, "logLevel">,
  destination?: DestinationStream,
): Logger {
  const options = {
    level: configuration.logLevel,
    serializers: { err: describeError },
    redact: ["*.cookie", "*.authorization", "*.token", "*.csrfToken", "*.sessionSecret", "*.clientSecret"],
  };
  return destination === undefined ? pino(options) : pino(options, destination);
}

interface LoggedRequest {
  readonly id: string;
  readonly method: string;
  readonly url: string;
  /** Express shortens `url` inside of routers. */
  readonly originalUrl?: string;
}

/** Addresses that are asked every few seconds and say nothing when they work. */
const quiet = new Set(["/healthz", "/readyz"]);

export function logRequests(log: Logger) {
  return pinoHttp({
    logger: log,
    genReqId: (_request: IncomingMessage, response: ServerResponse) => {
      const id = randomUUID();
      response.setHeader("X-Request-Id", id);
      return id;
    },
    autoLogging: { ignore: (request) => quiet.has(request.url ?? "") },
    customLogLevel: (_request, response, error) =>
      error !== undefined || response.statusCode >= 500 ? "error" : "info",
    // Only what is named here is written: headers hold cookies and tokens.
    wrapSerializers: false,
    serializers: {
      req: (request: LoggedRequest) => ({
        id: request.id,
        method: request.method,
        url: withoutSecrets(request.originalUrl ?? request.url),
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      err: describeError,
    },
  });
}
