/** What to do about a server that cannot start, for the failures that people meet. */
import type { Configuration } from "./configuration.ts";

type Settings = Pick<Configuration, "databaseUrl" | "host" | "port">;

/** Host, port and name, never the password. */
function placeOf(databaseUrl: string): string {
  if (!URL.canParse(databaseUrl)) return "the address in DATABASE_URL";
  const { host, pathname } = new URL(databaseUrl);
  return `${host}${pathname}`;
}

/** Null for anything else: its stack then says more than we could. Codes of PostgreSQL: its Appendix A. */
export function wordsForStartupFailure(error: unknown, settings: Settings): string | null {
  const code: unknown = error instanceof Error && "code" in error ? error.code : undefined;
  const place = placeOf(settings.databaseUrl);
  switch (code) {
    case "ECONNREFUSED":
    case "ENOTFOUND":
    case "ETIMEDOUT":
    case "ENOENT":
      return `PostgreSQL cannot be reached at ${place}. Is it running, and is DATABASE_URL right?`;
    case "28P01":
    case "28000":
      return `PostgreSQL at ${place} refuses the user or password in DATABASE_URL.`;
    case "3D000":
      return `PostgreSQL has no database at ${place}. Create it, or correct DATABASE_URL.`;
    case "42501":
      return `The user in DATABASE_URL may not create tables at ${place}. Make it the owner of the database.`;
    case "EADDRINUSE":
      return `Port ${settings.port} on ${settings.host} is taken. Set PORT to another, or to 0 for any.`;
    case "EACCES":
      return `Port ${settings.port} may not be used by this account. Set PORT to one above 1023.`;
    default:
      return null;
  }
}
