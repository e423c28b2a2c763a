/** Which rows of a stored batch are set aside when the first of `rest` does not apply. */
import type { BadRow } from "./build-document.ts";
import type { QueuedUpdate } from "./writer-reports.ts";

/** That row, and all that its sender sent after it, which may build on it. `rest` are the stored updates from it on. */
export function rowsSetAside(seq: number, reason: string, rest: readonly QueuedUpdate[]): readonly BadRow[] {
  const [culprit] = rest;
  if (culprit === undefined) return [{ seq, reason }];
  return rest.flatMap(({ connection }, index) =>
    connection === culprit.connection ? [{ seq: seq + index, reason }] : [],
  );
}
