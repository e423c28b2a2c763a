/** One word about a block, at the right of its heading. */
import type { BlockHandle } from "./block-handle.ts";

export interface BlockState {
  readonly words: string;
  readonly tone: "agrees" | "computing" | "partly" | "error";
}

/** `late`: the computation has taken long enough to be worth a word. */
export function stateOf(
  { evaluation, lastGood }: Pick<BlockHandle, "evaluation" | "lastGood">,
  late: boolean,
): BlockState {
  if (late || evaluation === null) return { words: "computing", tone: "computing" };
  const { value, problems } = evaluation;
  if (value === null) {
    return { words: lastGood ? "in error: shows its last good result" : "in error", tone: "error" };
  }
  if (problems.length === 0) return { words: "agrees", tone: "agrees" };
  return {
    words:
      problems.length === 1 ? "agrees, one entry in error" : `agrees, ${problems.length} entries in error`,
    tone: "partly",
  };
}
