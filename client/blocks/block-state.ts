/** A word about a block, at the right of its heading. */
import { kindDescriptions } from "#engine/descriptions.ts";
import type { Progress } from "#engine/kind.ts";
import type { BlockHandle, LongWorkState } from "./block-handle.ts";

export interface BlockState {
  readonly words: string;
  readonly tone: "agrees" | "computing" | "waiting" | "partly" | "error";
}

type Seen = Pick<BlockHandle, "kind" | "fields" | "tables" | "evaluation" | "lastGood" | "stopped">;

/** `late`: the computation has taken long enough to be worth a word. */
export function stateOf(block: Seen, pending: boolean, late: boolean): BlockState {
  const { evaluation, lastGood, stopped } = block;
  if (pending && stopped) return { words: "not computed: it took too long or failed", tone: "error" };
  if (late || evaluation === null) return { words: "computing", tone: "computing" };
  const { value, problems } = evaluation;
  if (value === null) {
    if (isUntouched(block)) return { words: "waits for its inputs", tone: "waiting" };
    return { words: lastGood ? "in error: shows its last good result" : "in error", tone: "error" };
  }
  if (problems.length === 0) return { words: "agrees", tone: "agrees" };
  return {
    words:
      problems.length === 1 ? "agrees, one entry in error" : `agrees, ${problems.length} entries in error`,
    tone: "partly",
  };
}

/** Of long work; null where there is none. */
export function stateOfWork(work: LongWorkState | null): BlockState | null {
  switch (work?.state) {
    case undefined:
      return null;
    case "waiting":
      return { words: "waits for its turn to be computed", tone: "computing" };
    case "computing":
      return { words: "computing", tone: "computing" };
    case "stopped":
      return { words: "stopped", tone: "waiting" };
    case "failed":
      return { words: "not computed: this browser gave up", tone: "error" };
  }
}

/** @example sayProgress({ done: 340, of: 812, part: "dimension 12" }) // "computing dimension 12: 340 of 812" */
export function sayProgress({ done, of, part }: Progress): string {
  const what = part === "" ? "computing" : `computing ${part}`;
  return of === null ? `${what}: ${done} so far` : `${what}: ${done} of ${of}`;
}

/** As it was placed: nothing typed that a result depends on. What is missing is then an invitation, not an error. */
export function isUntouched({
  kind,
  fields,
  tables,
}: Pick<BlockHandle, "kind" | "fields" | "tables">): boolean {
  const { shape } = kindDescriptions[kind];
  return (
    Object.entries(shape.fields).every(([name, spec]) => !spec.keyed || fields[name] === spec.initial) &&
    Object.values(tables).every((rows) => rows.length === 0)
  );
}
