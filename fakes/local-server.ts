/** A small HTTP server on loopback, and pages that look like nothing else in the house. */
import type { RequestListener } from "node:http";
import { createServer } from "node:http";
import type { AddressInfo } from "node:net";

export interface LocalServer {
  readonly url: string;
  readonly port: number;
  stop(): Promise<void>;
}

export function startLocalServer(handler: RequestListener, port: number): Promise<LocalServer> {
  const server = createServer(handler);
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, "127.0.0.1", () => {
      // A server that listens on a port has an address of this kind, not a pipe's name.
      const { port: given } = server.address() as AddressInfo;
      resolve({
        url: `http://127.0.0.1:${given}`,
        port: given,
        stop: () =>
          new Promise((ended) => {
            server.close(() => ended());
            server.closeAllConnections();
          }),
      });
    });
  });
}

const escapes: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => escapes[character] ?? character);
}

/** `body` is HTML. */
export function standInPage(title: string, body: string): string {
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>
<style>
  body { margin: 0; background: #f6efdf; color: #2d2416; font: 1.0625rem/1.5 Georgia, serif; }
  main { max-width: 38rem; margin: 3rem auto; padding: 0 1.25rem; }
  .notice { border: 2px dashed #7a5a1e; padding: .6rem .9rem; background: #fffaf0; }
  ul { list-style: none; padding: 0; }
  li { border-bottom: 1px solid #b9a67f; padding: .6rem 0; }
  button { font: inherit; color: #2d2416; background: #fffaf0; border: 1px solid #7a5a1e; padding: .3rem .8rem; cursor: pointer; }
  button:hover, button:focus-visible { background: #efe0bb; outline: 3px solid #7a5a1e; outline-offset: 2px; }
  pre { white-space: pre-wrap; font: .9375rem/1.5 monospace; }
  a { color: #5b3d00; }
</style>
</head>
<body><main>${body}</main></body>
</html>`;
}

export const pageHeaders = {
  "content-type": "text/html; charset=utf-8",
  "cache-control": "no-store",
  "content-security-policy":
    "default-src 'none'; style-src 'unsafe-inline'; base-uri 'none'; frame-ancestors 'none'",
  "x-content-type-options": "nosniff",
} as const;
