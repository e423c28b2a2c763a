/** What browsers are told not to do with our pages. */
import type { RequestHandler } from "express";
import helmet from "helmet";

export function securityHeaders(publicUrl: string): RequestHandler {
  const address = new URL(publicUrl);
  const secure = address.protocol === "https:";
  const socketOrigin = `${secure ? "wss" : "ws"}://${address.host}`;
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        workerSrc: ["'self'"],
        // KaTeX positions symbols, and the editor colours remote carets, with style attributes; dialogs and the editor
        // add style elements while they are open. Styles cannot run code here: no address but ours can be reached.
        styleSrc: ["'self'", "'unsafe-inline'"],
        fontSrc: ["'self'", "data:"],
        imgSrc: ["'self'", "data:"],
        // Not every browser takes 'self' to include the socket of the same host.
        connectSrc: ["'self'", socketOrigin],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        // On plain HTTP the upgrade would lead to a port where nobody speaks TLS.
        ...(secure ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: secure ? { maxAge: 31_536_000 } : false,
    referrerPolicy: { policy: "same-origin" },
    xFrameOptions: { action: "deny" },
  });
}

/** A referee's address is a key: no other site may learn it from a followed link. */
export const hideReferrer: RequestHandler = (_request, response, next) => {
  response.setHeader("Referrer-Policy", "no-referrer");
  response.setHeader("X-Robots-Tag", "noindex, nofollow");
  next();
};
