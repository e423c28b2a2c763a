/** Two people's editors on one notebook, with the network between them in the test's hands. */
import { Editor, type JSONContent } from "@tiptap/core";
import { Collaboration } from "@tiptap/extension-collaboration";
import { prosemirrorJSONToYXmlFragment } from "@tiptap/y-tiptap";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { documentExtensions, documentSchema } from "#schema/document-schema.ts";
import { createBlockDirectory, type BlockDirectory } from "../../../client/editor/blocks/block-directory.ts";
import { BlockPairing } from "../../../client/editor/blocks/block-pairing.ts";
import { ProseCaret } from "../../../client/editor/pins/prose-caret.ts";
import { createHistory, type NotebookHistory } from "../../../client/editor/history.ts";

export interface Person {
  readonly doc: Y.Doc;
  readonly fragment: Y.XmlFragment;
  readonly editor: Editor;
  readonly history: NotebookHistory;
  readonly directory: BlockDirectory;
}

export function person(clientId: number, state: Uint8Array): Person {
  const doc = new Y.Doc();
  doc.clientID = clientId;
  Y.applyUpdate(doc, state);
  const history = createHistory(doc);
  const fragment = doc.getXmlFragment(FRAGMENT);
  const editor = new Editor({
    element: document.body.appendChild(document.createElement("div")),
    extensions: [
      ...documentExtensions,
      Collaboration.configure({
        document: doc,
        field: FRAGMENT,
        yUndoOptions: { undoManager: history.manager },
      }),
      BlockPairing,
      ProseCaret,
    ],
  });
  return { doc, fragment, editor, history, directory: createBlockDirectory(fragment) };
}

export function notebookState(content: JSONContent[]): Uint8Array {
  const doc = new Y.Doc();
  doc.clientID = 1;
  prosemirrorJSONToYXmlFragment(documentSchema, { type: "doc", content }, doc.getXmlFragment(FRAGMENT));
  return Y.encodeStateAsUpdate(doc);
}

/** Both act without hearing of each other; then the two messages cross, in the order asked for. */
export function meet(
  first: Person,
  second: Person,
  act: { first(): void; second(): void },
  later: "first" | "second",
) {
  const [before1, before2] = [Y.encodeStateVector(first.doc), Y.encodeStateVector(second.doc)];
  act.first();
  act.second();
  const from1 = Y.encodeStateAsUpdate(first.doc, before1);
  const from2 = Y.encodeStateAsUpdate(second.doc, before2);
  if (later === "first") {
    Y.applyUpdate(first.doc, from2);
    Y.applyUpdate(second.doc, from1);
  } else {
    Y.applyUpdate(second.doc, from1);
    Y.applyUpdate(first.doc, from2);
  }
  // What one of them repaired while reading would be sent too.
  for (let round = 0; round < 3; round++) {
    Y.applyUpdate(second.doc, Y.encodeStateAsUpdate(first.doc, Y.encodeStateVector(second.doc)));
    Y.applyUpdate(first.doc, Y.encodeStateAsUpdate(second.doc, Y.encodeStateVector(first.doc)));
  }
}

export function leave(...people: Person[]) {
  for (const { editor, directory, history, doc } of people) {
    editor.destroy();
    directory.destroy();
    history.destroy();
    doc.destroy();
  }
  document.body.replaceChildren();
}

export function paragraph(text: string): JSONContent {
  return { type: "paragraph", content: [{ type: "text", text }] };
}
export function row(
  table: string,
  rowId: string,
  order: string,
  values: Readonly<Record<string, string>>,
): JSONContent {
  return {
    type: "row",
    attrs: { table, rowId, order },
    content: Object.entries(values).map(([field, value]) => ({ type: "cell", attrs: { field, value } })),
  };
}
