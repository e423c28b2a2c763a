/** Gzip for the page's hashed files: compressed once, on first demand, and kept, since they never change. */
import { readFile } from "node:fs/promises";
import { extname, join } from "node:path";
import { promisify } from "node:util";
import { constants, gzip } from "node:zlib";
import type { RequestHandler } from "express";

/** Fonts and pictures are compressed already. */
const compressible = new Set([".js", ".css", ".svg", ".json"]);
/** A name without a path in it, so nothing outside the folder can be meant. */
const plainName = /^\/[A-Za-z0-9_-][A-Za-z0-9_.-]*$/;
const MOST_FILES = 500;
const compress = promisify(gzip);

export function serveCompressed(folder: string, cacheControl: string): RequestHandler {
  const kept = new Map<string, Promise<Buffer | null>>();

  async function compressed(name: string): Promise<Buffer | null> {
    try {
      return await compress(await readFile(join(folder, name)), { level: constants.Z_BEST_COMPRESSION });
    } catch (error) {
      if (error instanceof Error && "code" in error && error.code === "ENOENT") return null;
      throw error;
    }
  }
  function find(name: string): Promise<Buffer | null> {
    const found = kept.get(name) ?? compressed(name);
    if (kept.size < MOST_FILES) kept.set(name, found);
    // What is missing may be built later, and what failed may succeed.
    found.then(
      (content) => content === null && kept.delete(name),
      () => kept.delete(name),
    );
    return found;
  }

  return async (request, response, next) => {
    if (request.method !== "GET" && request.method !== "HEAD") return next();
    const extension = extname(request.path);
    if (!compressible.has(extension) || !plainName.test(request.path)) return next();
    response.vary("Accept-Encoding");
    if (request.acceptsEncodings("gzip") !== "gzip") return next();
    const content = await find(request.path);
    if (content === null) return next();
    response.set({ "Content-Encoding": "gzip", "Cache-Control": cacheControl });
    response.type(extension).send(content);
  };
}
