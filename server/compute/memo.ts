/** A memo of evaluations that forgets what was used longest ago. */
import type { Evaluation, Memo } from "#engine/index.ts";

export function createMemo(most: number): Memo {
  const known = new Map<string, Evaluation>();
  return {
    get(key) {
      const evaluation = known.get(key);
      if (evaluation !== undefined) {
        known.delete(key);
        known.set(key, evaluation);
      }
      return evaluation;
    },
    set(key, evaluation) {
      known.delete(key);
      known.set(key, evaluation);
      const [oldest] = known.keys();
      if (known.size > most && oldest !== undefined) known.delete(oldest);
    },
  };
}
