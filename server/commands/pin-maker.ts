/** Pins for documents that are written in code: their values are taken from the engine, never written by hand. */
import {
  defaultPinFormat,
  evaluateNotebook,
  formatScalar,
  parsePinFormat,
  printPinFormat,
  readDocument,
} from "#engine/index.ts";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import type { DocumentNode } from "./document-builder.ts";

/** Makes a pin of one scalar of one block; `format` as in engine/notebook/pin-format.ts. */
export type PinMaker = (blockId: string, scalar: string, format: string) => DocumentNode;

/** Takes each pinned value from the blocks as the engine evaluates them now. */
export function pinsOf(blocks: readonly DocumentNode[]): PinMaker {
  const outcomes = evaluateNotebook(readDocument({ type: "doc", content: blocks }).blocks, {
    memo: new Map(),
    onInternalError: (error) => {
      throw error;
    },
  });
  return (blockId, scalarId, format) => {
    const outcome = outcomes.find((candidate) => candidate.blockId === blockId);
    const scalar = outcome?.evaluation.scalars.find(({ id }) => id === scalarId);
    if (!outcome || !scalar)
      throw new Error(`the demonstration pins ${blockId}/${scalarId}, which no block gives`);
    const shown = format === "" ? defaultPinFormat : parsePinFormat(format);
    const attrs: PinAttributes = {
      pinId: `${blockId}-${scalarId}`.replaceAll("/", "-"),
      blockId,
      scalar: scalarId,
      resultKey: outcome.key,
      value: JSON.stringify(scalar.value),
      text: formatScalar(scalar.value, shown),
      format: printPinFormat(shown),
    };
    return { type: pinNode, attrs: { ...attrs } };
  };
}
