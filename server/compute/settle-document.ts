/** Document in, results out. Pure but for a memo: runs in a compute thread, and at seeding in the server's own. */
import type * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import {
  countPins,
  evaluateNotebook,
  premisesLine,
  readDocument,
  type BlockInstance,
  type Evaluation,
  type Memo,
} from "#engine/index.ts";
import { readFragment } from "./read-fragment.ts";
import type { SettledDocument } from "./tasks.ts";

export function settleDocument(document: Y.Doc, memo: Memo): SettledDocument {
  return settleJson(readFragment(document.getXmlFragment(FRAGMENT)), memo);
}

/** The same for a document in ProseMirror's JSON. */
export function settleJson(json: unknown, memo: Memo): SettledDocument {
  const { blocks, pins } = readDocument(json);
  const mistakes: string[] = [];
  const outcomes = evaluateNotebook(blocks, {
    memo,
    onInternalError: (error, block) =>
      mistakes.push(
        `${block.kind} ${block.id}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
      ),
  });
  const instances = new Map<string, BlockInstance>(blocks.map((block) => [block.id, block]));
  const keys = new Map<string, string>(outcomes.map(({ blockId, key }) => [blockId, key]));
  const evaluations = new Map<string, Evaluation>(
    outcomes.map(({ blockId, evaluation }) => [blockId, evaluation]),
  );
  return {
    blocks: outcomes.map(({ blockId, kind, key, standsOn, evaluation }) => ({
      blockId,
      kind,
      key,
      standsOn,
      evaluation,
      inputs: {
        kind,
        inputs: instances.get(blockId)?.inputs ?? {},
        standsOn: standsOn === null ? null : (keys.get(standsOn) ?? null),
      },
    })),
    premisesLine: premisesLine(blocks),
    pins: countPins(pins, evaluations),
    mistakes,
  };
}
