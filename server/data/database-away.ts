/** Tells a database that cannot be reached, which passes, from a statement that is wrong, which is our mistake. */

/** SQLSTATE classes (PostgreSQL documentation, appendix A): connection, resources, operator intervention. */
const awayStates = /^(08|53|57P)/;
const awayCodes = new Set(["ECONNREFUSED", "ECONNRESET", "EPIPE", "ETIMEDOUT", "ENOTFOUND", "EHOSTUNREACH"]);
/** What pg says without a code when the other end is gone or does not answer. */
const awayWords = /^(Connection terminated|timeout exceeded when trying to connect)/;

export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const code = "code" in error && typeof error.code === "string" ? error.code : "";
  return (
    awayStates.test(code) ||
    awayCodes.has(code) ||
    awayWords.test(error.message) ||
    error.name === "KnexTimeoutError"
  );
}
