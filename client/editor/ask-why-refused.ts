/** A browser hides why a socket was refused; the API says it. */
import type { ConnectionPhase } from "./connection-words.ts";

const phaseOfStatus: Readonly<Record<number, ConnectionPhase>> = {
  401: "signed-out",
  403: "forbidden",
  404: "not-found",
  410: "not-found",
};

/** The final reason, or null when trying again makes sense. */
export async function askWhyRefused(
  notebookId: string,
  token: string | null,
): Promise<ConnectionPhase | null> {
  const path = token === null ? `/api/notebooks/${notebookId}` : `/api/referee/${encodeURIComponent(token)}`;
  try {
    const answer = await fetch(path, { credentials: "same-origin", headers: { accept: "application/json" } });
    return phaseOfStatus[answer.status] ?? null;
  } catch (error) {
    // No network: trying again is all one can do.
    if (error instanceof TypeError) return null;
    throw error;
  }
}
