/** Which failures of the store pass by themselves (it is away, busy, restarting) and which never do. */

/** SQLSTATE classes (PostgreSQL documentation, appendix A): connection, rollback, resources, state, intervention, system. */
const passingClasses = new Set(["08", "40", "53", "55", "57", "58"]);

/** Anything that is no complaint of PostgreSQL about the statement itself counts as passing: sockets, timeouts. */
export function isPassing(error: unknown): boolean {
  if (!(error instanceof Error) || !("code" in error) || typeof error.code !== "string") return true;
  // Five capitals and digits, one digit at least: "EPIPE" is none.
  const isSqlState = /^(?=.*\d)[0-9A-Z]{5}$/.test(error.code);
  return !isSqlState || passingClasses.has(error.code.slice(0, 2));
}
