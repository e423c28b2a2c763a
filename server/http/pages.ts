/** The built page: hashed files for ever, and index.html, never kept, for every address the router knows. */
import { existsSync } from "node:fs";
import { join } from "node:path";
import express, { Router, type RequestHandler } from "express";
import { refuse } from "../commands/outcome.ts";
import { serveCompressed } from "./compressed-files.ts";
import { hideReferrer } from "./security-headers.ts";
import { sendProblem } from "./problems.ts";

/** The name of a hashed file changes with its content. */
const FOR_EVER = "public, max-age=31536000, immutable";
const loopbackNames = new Set(["localhost", "127.0.0.1", "[::1]"]);

/**
 * Cookies and origins belong to one name. Who types 127.0.0.1 where the address says localhost is led to
 * the address, or signing in would come back to a page that does not know them.
 */
function leadToPublicName(publicUrl: string): RequestHandler {
  const { hostname, origin, host } = new URL(publicUrl);
  return (request, response, next) => {
    const asked = request.get("Host");
    if (asked === undefined || asked === host || !loopbackNames.has(hostname)) return next();
    if (!loopbackNames.has(asked.replace(/:\d+$/, ""))) return next();
    // Joined as text: read against a base, the path "//elsewhere" would be another host.
    const goal = `${origin}${request.originalUrl}`;
    if (!URL.canParse(goal) || new URL(goal).origin !== origin) return next();
    response.redirect(307, new URL(goal).href);
  };
}

export function servePages(clientFolder: string | null, publicUrl: string): Router {
  const router = Router();
  router.use("/r", hideReferrer);
  if (clientFolder === null) return router;
  const index = join(clientFolder, "index.html");
  const assets = join(clientFolder, "assets");
  router.use(
    "/assets",
    serveCompressed(assets, FOR_EVER),
    express.static(assets, {
      index: false,
      setHeaders: (response) => response.setHeader("Cache-Control", FOR_EVER),
    }),
    (_request, response) => sendProblem(response, refuse("not-found")),
  );
  router.use(express.static(clientFolder, { index: false, maxAge: 0, dotfiles: "ignore" }));
  router.get("/{*page}", leadToPublicName(publicUrl), (request, response, next) => {
    if (!request.accepts("html")) return next();
    if (!existsSync(index))
      return sendProblem(response, refuse("unavailable", "The page has not been built yet."));
    response.setHeader("Cache-Control", "no-cache");
    response.sendFile(index);
  });
  return router;
}
