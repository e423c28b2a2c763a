/** The inside of a compute thread. */
import { buildDocument } from "../collab/build-document.ts";
import { compactHere, type Compacted } from "../collab/compaction.ts";
import { evaluateFile, type FileOutcome } from "./evaluate-file.ts";
import { createMemo } from "./memo.ts";
import { computeLong, settleDocument } from "./settle-document.ts";
import type { ComputeTask, FileAnswer, LongAnswer, SettledDocument } from "./tasks.ts";

const memo = createMemo(2_000);
/** A file of some kilobytes can ask for a thousand times as much. */
const LARGEST_ANSWER_CHARACTERS = 8 * 1024 * 1024;

function withinReason(outcome: FileOutcome): FileOutcome {
  if (!outcome.ok || JSON.stringify(outcome.results).length <= LARGEST_ANSWER_CHARACTERS) return outcome;
  const message = "asks for more results than are sent at once: send fewer blocks";
  return { ok: false, complaints: [{ place: "the file", message }] };
}

export default function perform(
  task: ComputeTask,
): SettledDocument | LongAnswer | FileAnswer | Promise<Compacted> {
  switch (task.task) {
    case "settle": {
      for (const [key, evaluation] of task.known ?? []) memo.set(key, evaluation);
      const { document } = buildDocument(task.document, []);
      const settled = settleDocument(document, memo);
      document.destroy();
      return settled;
    }
    case "long": {
      for (const [key, evaluation] of task.known) memo.set(key, evaluation);
      const { document } = buildDocument(task.document, []);
      const answer = computeLong(document, task.blockId, memo);
      document.destroy();
      return answer;
    }
    case "file": {
      const mistakes: string[] = [];
      const outcome = evaluateFile(task.body, (error, block) => {
        mistakes.push(
          `${block.kind}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
        );
      });
      return { outcome: withinReason(outcome), mistakes };
    }
    case "compact":
      return compactHere(task);
  }
}
