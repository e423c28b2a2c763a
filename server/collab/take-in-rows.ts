/** Rows that another process has committed, taken in as they lie in the log. */
import { setImmediate as nextTurn } from "node:timers/promises";
import type { BadRow } from "./build-document.ts";
import { CommittedBy, type CommittedDocument } from "./committed-document.ts";
import type { DocumentStore } from "./document-store.ts";
import { STEPS_PER_TURN } from "./integration-meter.ts";

interface Place {
  readonly notebookId: string;
  readonly store: DocumentStore;
  readonly document: CommittedDocument;
}

/** Null, or the first row that does not apply. */
export async function takeInRows(
  { notebookId, store, document }: Place,
  upTo: number,
  isGivenUp: () => boolean,
): Promise<BadRow | null> {
  const rows = await store.readAfter(notebookId, document.lastSeq);
  let stepsInTurn = 0;
  for (const { seq, update, personId } of rows) {
    if (isGivenUp()) return null;
    if (seq <= document.lastSeq || seq > upTo) continue;
    const applied = document.apply(seq, update, new CommittedBy(personId, null));
    if (!applied.ok) return { seq, reason: applied.reason };
    stepsInTurn += applied.steps;
    if (stepsInTurn < STEPS_PER_TURN) continue;
    stepsInTurn = 0;
    // Other notebooks get their turn between laborious rows.
    await nextTurn();
  }
  // Quarantined rows are passed over, and so leave gaps.
  document.lastSeq = Math.max(document.lastSeq, upTo);
  return null;
}
