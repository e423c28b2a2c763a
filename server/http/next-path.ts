/** Where to go after signing in: only ever a path of our own. */

const LONGEST = 500;
/** A base that no real address shares. */
const base = "http://base.invalid";

/** The path as a browser would read it, or "/" for anything that leads elsewhere. */
export function safeNextPath(wish: unknown): string {
  if (typeof wish !== "string" || wish.length > LONGEST || !wish.startsWith("/")) return "/";
  if (!URL.canParse(wish, base)) return "/";
  const read = new URL(wish, base);
  if (read.origin !== base) return "/";
  const path = `${read.pathname}${read.search}${read.hash}`;
  // "/.//elsewhere" is read as the path "//elsewhere", which in a Location header is another host.
  if (/^\/[/\\]/.test(path)) return "/";
  return /^\/(auth|api|collab)(\/|$|\?)/.test(path) ? "/" : path;
}
