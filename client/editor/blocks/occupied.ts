/** Blocks that colleagues are in: what to ask before such a block is made anew, and the mark of what was agreed to. */
import { PluginKey, type Transaction } from "@tiptap/pm/state";
import type { BlockWorld, Question } from "./block-world.ts";

export const careKey = new PluginKey("blockCare");

/** Marks a transaction that needs no question any more. */
export function agreed(transaction: Transaction): Transaction {
  return transaction.setMeta(careKey, "agreed");
}
export function isAgreed(transaction: Transaction): boolean {
  return transaction.getMeta(careKey) === "agreed";
}

/** Null when nobody else is in any of the blocks. */
export function occupiedQuestion(
  { presence }: Pick<BlockWorld, "presence">,
  blockIds: readonly string[],
  happening: "moves" | "goes" | "changes place or goes",
): Pick<Question, "title" | "sentence"> | null {
  const names = [...new Set(blockIds.flatMap((id) => presence.inBlock(id).map(({ name }) => name)))];
  if (names.length === 0) return null;
  const who =
    names.length === 1 ? names.join("") : `${names.slice(0, -1).join(", ")} and ${names.at(-1) ?? ""}`;
  const are = names.length > 1 ? "are" : "is";
  return {
    title: `${who} ${are} in ${blockIds.length === 1 ? "this block" : "one of these blocks"}`,
    sentence: `What ${who} ${are} typing there at this moment may be lost when the block ${happening}.`,
  };
}
