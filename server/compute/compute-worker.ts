/** The inside of a compute thread. */
import { buildDocument } from "../collab/build-document.ts";
import { compactHere, type Compacted } from "../collab/compaction.ts";
import { evaluateFile, type FileOutcome } from "./evaluate-file.ts";
import { createMemo } from "./memo.ts";
import { settleDocument } from "./settle-document.ts";
import type { ComputeTask, FileAnswer, SettledDocument } from "./tasks.ts";

const memo = createMemo(2_000);
/** A file of some kilobytes can ask for a thousand times as much. */
const LARGEST_ANSWER_CHARACTERS = 8 * 1024 * 1024;

function withinReason(outcome: FileOutcome): FileOutcome {
  if (!outcome.ok || JSON.stringify(outcome.results).length <= LARGEST_ANSWER_CHARACTERS) return outcome;
  const message = "asks for more results than are sent at once: send fewer blocks";
  return { ok: false, complaints: [{ place: "the file", message }] };
}

export default function perform(task: ComputeTask): SettledDocument | FileAnswer | Promise<Compacted> {
  switch (task.task) {
    case "settle": {
      const { document } = buildDocument(task.document, []);
      const settled = settleDocument(document, memo);
      document.destroy();
      return settled;
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
