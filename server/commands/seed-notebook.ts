/** Writes a template's document into a notebook that was just made. */
import {
  defaultPinFormat,
  evaluateNotebook,
  formatScalar,
  parsePinFormat,
  printPinFormat,
  readDocument,
} from "#engine/index.ts";
import { pinNode, type PinAttributes } from "#schema/block-structure.ts";
import { seedDocument } from "../compute/seed-document.ts";
import type { SeedNotebook } from "./create-notebook.ts";
import { lanternBlocks, lanternDocument, type PinMaker } from "./lantern-notebook.ts";

export const seedNotebook: SeedNotebook = async (transaction, notebookId, template) => {
  // A blank document is one without updates.
  if (template === "blank") return;
  await seedDocument(transaction, notebookId, lanternDocument(pinsOfLantern()));
};

/** Takes each pinned value from the blocks as the engine evaluates them now. */
function pinsOfLantern(): PinMaker {
  const { blocks } = readDocument({ type: "doc", content: lanternBlocks });
  const outcomes = evaluateNotebook(blocks, {
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
