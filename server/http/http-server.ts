/** The HTTP server under everything, with the patience it has for those who speak slowly or wrongly. */
import { createServer, type Server } from "node:http";
import type { Logger } from "pino";

export interface Patience {
  /** Until a request's head is there; also of one that asks for a socket. */
  readonly headersMs: number;
  /** Until all of it is there. */
  readonly requestMs: number;
  readonly checkEveryMs: number;
}
const usualPatience: Patience = { headersMs: 15_000, requestMs: 60_000, checkEveryMs: 5_000 };

export function openHttpServer(log: Logger, patience = usualPatience): Server {
  const server = createServer({
    headersTimeout: patience.headersMs,
    requestTimeout: patience.requestMs,
    connectionsCheckingInterval: patience.checkEveryMs,
  });
  server.on("clientError", (error: Error & { code?: string }, socket) => {
    log.debug({ err: error }, "a client spoke no HTTP");
    const status = error.code === "ERR_HTTP_REQUEST_TIMEOUT" ? "408 Request Timeout" : "400 Bad Request";
    if (socket.writable) socket.end(`HTTP/1.1 ${status}\r\nConnection: close\r\n\r\n`);
  });
  return server;
}
