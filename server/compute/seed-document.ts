/** Writes the first state of a notebook's document, with its results: a template, not anybody's edit. */
import { prosemirrorJSONToYDoc } from "@tiptap/y-tiptap";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { documentSchema } from "#schema/document-schema.ts";
import type { Queryable } from "../data/database.ts";
import { createMemo } from "./memo.ts";
import { settleJson } from "./settle-document.ts";
import { storeSettled } from "./store-settled.ts";
import { wordsOf } from "./words-of.ts";

/**
 * To be called in the transaction that makes the notebook, before anyone can open it. It is the state that the log of
 * updates begins from, so no undo reaches it and no person is named for it. Throws when `json` does not fit the schema.
 */
export async function seedDocument(transaction: Queryable, notebookId: string, json: unknown): Promise<void> {
  documentSchema.nodeFromJSON(json).check();
  const document = prosemirrorJSONToYDoc(documentSchema, json, FRAGMENT);
  await transaction.raw("insert into document_states (notebook_id, seq, state) values (?, 0, ?)", [
    notebookId,
    Buffer.from(Y.encodeStateAsUpdate(document)),
  ]);
  const words = wordsOf(document.getXmlFragment(FRAGMENT));
  document.destroy();
  const nobody = { blocks: new Map<string, string | null>(), structure: null };
  await storeSettled(transaction, notebookId, { ...settleJson(json, createMemo(100)), words }, nobody);
}
