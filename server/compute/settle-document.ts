/** Document in, results out. Pure but for a memo: runs in a compute thread, and at seeding in the server's own. */
import type * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import {
  countPins,
  evaluateNotebook,
  neededFor,
  premisesLine,
  readDocument,
  type BlockInstance,
  type Evaluation,
  type Memo,
  type NotebookOutcome,
  type Postponed,
} from "#engine/index.ts";
import { readFragment } from "./read-fragment.ts";
import { wordsOf } from "./words-of.ts";
import type { LongAnswer, SettledBlock, SettledDocument } from "./tasks.ts";

/** Long work whose result is not in the memo is named as postponed. */
export function settleDocument(document: Y.Doc, memo: Memo): SettledDocument {
  const postponed: Postponed[] = [];
  const settled = settleJson(readFragment(document.getXmlFragment(FRAGMENT)), memo, (later) =>
    postponed.push(later),
  );
  return { ...settled, postponed, words: wordsOf(document.getXmlFragment(FRAGMENT)) };
}

/** The same for a document in ProseMirror's JSON; without `onPostponed` everything is evaluated, however long it takes. */
export function settleJson(
  json: unknown,
  memo: Memo,
  onPostponed?: (postponed: Postponed) => void,
): SettledDocument {
  const { blocks, pins } = readDocument(json);
  const mistakes: string[] = [];
  const waiting = new Set<string>();
  const outcomes = evaluateNotebook(blocks, {
    memo,
    onInternalError: noteIn(mistakes),
    ...(onPostponed && {
      onPostponed(later: Postponed) {
        waiting.add(later.blockId);
        onPostponed(later);
      },
    }),
  });
  const evaluations = new Map<string, Evaluation>(
    outcomes.map(({ blockId, evaluation }) => [blockId, evaluation]),
  );
  return {
    blocks: settledBlocks(blocks, outcomes),
    premisesLine: premisesLine(blocks),
    // A number that is still being computed has neither moved nor come loose.
    pins: countPins(
      pins.filter(({ blockId }) => !waiting.has(blockId)),
      evaluations,
    ),
    words: null,
    postponed: [],
    mistakes,
  };
}

/** One block, however long it takes; null when it is not in the document. */
export function computeLong(document: Y.Doc, blockId: string, memo: Memo): LongAnswer {
  const blocks = neededFor(blockId, readDocument(readFragment(document.getXmlFragment(FRAGMENT))).blocks);
  const mistakes: string[] = [];
  const outcomes = evaluateNotebook(blocks, { memo, onInternalError: noteIn(mistakes) });
  const block = settledBlocks(blocks, outcomes).find((settled) => settled.blockId === blockId);
  return { block: block ?? null, mistakes };
}

function noteIn(mistakes: string[]) {
  return (error: unknown, block: BlockInstance) =>
    mistakes.push(
      `${block.kind} ${block.id}: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`,
    );
}

function settledBlocks(
  blocks: readonly BlockInstance[],
  outcomes: readonly NotebookOutcome[],
): readonly SettledBlock[] {
  const instances = new Map<string, BlockInstance>(blocks.map((block) => [block.id, block]));
  const keys = new Map<string, string>(outcomes.map(({ blockId, key }) => [blockId, key]));
  return outcomes.map(({ blockId, kind, key, standsOn, evaluation }) => ({
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
  }));
}
