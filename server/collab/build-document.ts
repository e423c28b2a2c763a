/** Makes a document of its stored parts. A row that does not apply is left out and named, never in the way. */
import * as Y from "yjs";
import { metered, noLimits, rowLimits } from "./integration-meter.ts";

export interface StoredUpdate {
  readonly seq: number;
  readonly update: Uint8Array;
  readonly personId: string | null;
}
export interface BadRow {
  readonly seq: number;
  readonly reason: string;
}
export interface BuiltDocument {
  readonly document: Y.Doc;
  /** Rows left out. */
  readonly bad: readonly BadRow[];
  /** Steps that finding the place of everything took. */
  readonly walked: number;
}

/** The origin of what comes from the store while a document is being made. */
const loadingOrigin = Symbol("loading");

/**
 * After a failure the document may hold half a row, so it is thrown away and made again without that row.
 * Throws when the compacted state itself does not apply: a failed load is an error, never an emptier document.
 */
export function buildDocument(state: Uint8Array | null, rows: readonly StoredUpdate[]): BuiltDocument {
  const bad: BadRow[] = [];
  let good = rows;
  for (;;) {
    const document = new Y.Doc({ gc: true });
    const outcome = applyInOrder(document, state, good);
    if (typeof outcome === "number") return { document, bad, walked: outcome };
    // Those that cannot even be read are found in one go, so that many bad rows do not mean many rounds.
    const unreadable = good.flatMap((row) => failureOf(row, () => Y.decodeUpdate(row.update)));
    const found = unreadable.some(({ seq }) => seq === outcome.seq) ? unreadable : [...unreadable, outcome];
    bad.push(...found);
    good = good.filter(({ seq }) => !found.some((row) => row.seq === seq));
  }
}

/** Rows are applied one by one inside one transaction: merging many small rows first would be quadratic. */
function applyInOrder(
  document: Y.Doc,
  state: Uint8Array | null,
  rows: readonly StoredUpdate[],
): BadRow | number {
  let walked = 0;
  if (state !== null)
    walked += metered(document, noLimits, () => Y.applyUpdate(document, state, loadingOrigin)).walked;
  const [first] = rows;
  if (first === undefined) return walked;
  let current = first;
  const failures = failureOf({ seq: -1 }, () =>
    document.transact(() => {
      for (const row of rows) {
        current = row;
        walked += metered(document, rowLimits, () =>
          Y.applyUpdate(document, row.update, loadingOrigin),
        ).walked;
      }
    }, loadingOrigin),
  );
  return failures.map(({ reason }) => ({ seq: current.seq, reason }))[0] ?? walked;
}

function failureOf({ seq }: { readonly seq: number }, work: () => unknown): readonly BadRow[] {
  try {
    work();
    return [];
  } catch (error) {
    return [{ seq, reason: error instanceof Error ? error.message : String(error) }];
  }
}
