/** Requests that change something must come from our own page, with the token of their session. */
import { randomBytes, timingSafeEqual } from "node:crypto";
import type { RequestHandler } from "express";
import { refuse } from "../commands/outcome.ts";
import { sendProblem } from "./problems.ts";

export const CSRF_HEADER = "X-CSRF-Token";
/** Methods that change nothing (RFC 9110, section 9.2.1). */
export const harmless: ReadonlySet<string> = new Set(["GET", "HEAD", "OPTIONS"]);

export function newCsrfToken(): string {
  return randomBytes(32).toString("base64url");
}

function isSameText(one: string, other: string): boolean {
  const [left, right] = [Buffer.from(one), Buffer.from(other)];
  return left.length === right.length && timingSafeEqual(left, right);
}

/**
 * Two independent locks. The browser's own word on the origin stops forged requests even with a stolen token;
 * the token stops them where a browser says nothing. Someone signed out has no rights that could be borrowed,
 * so no token is asked of them.
 */
export function requireSameSite(publicUrl: string): RequestHandler {
  const origin = new URL(publicUrl).origin;
  return (request, response, next) => {
    if (harmless.has(request.method)) return next();
    const site = request.get("Sec-Fetch-Site");
    const sentOrigin = request.get("Origin");
    if (site !== undefined && site !== "same-origin" && site !== "none")
      return sendProblem(response, refuse("cross-site"));
    if (sentOrigin !== undefined && sentOrigin !== origin) return sendProblem(response, refuse("cross-site"));
    const { personId, csrfToken } = request.session;
    const sentToken = request.get(CSRF_HEADER) ?? "";
    if (personId !== undefined && (csrfToken === undefined || !isSameText(csrfToken, sentToken)))
      return sendProblem(response, refuse("cross-site"));
    next();
  };
}
