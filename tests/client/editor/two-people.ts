/** Two people on one notebook, each with a document, a history and an editor; what one does reaches the other. */
import { Editor, type NodeViewRenderer } from "@tiptap/core";
import { Awareness } from "y-protocols/awareness";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { editorExtensions } from "../../../client/editor/editor-extensions.ts";
import { createHistory, type NotebookHistory } from "../../../client/editor/history.ts";
import { createMathEditing } from "../../../client/editor/mathematics/math-editing.ts";
import type { NotebookSession } from "../../../client/editor/notebook-session.ts";

export interface Person {
  readonly doc: Y.Doc;
  readonly fragment: Y.XmlFragment;
  readonly history: NotebookHistory;
  readonly editor: Editor;
  text(): string;
}

export interface TwoPeople {
  readonly wren: Person;
  readonly otto: Person;
  /** Nothing is passed on until `reconnect`. */
  disconnect(): void;
  reconnect(): void;
  leave(): void;
}

export type Views = Readonly<Record<string, NodeViewRenderer>>;

export function onePerson(doc = new Y.Doc(), history = createHistory(doc), views: Views = {}): Person {
  const session = sessionOn(doc, history);
  const editor = new Editor({
    extensions: editorExtensions({
      session,
      editing: createMathEditing(),
      views,
      others: [],
      openIndex: () => undefined,
    }),
    injectCSS: false,
  });
  return {
    doc,
    fragment: doc.getXmlFragment(FRAGMENT),
    history,
    editor,
    text: () => editor.getText({ blockSeparator: "\n" }),
  };
}

export function twoPeople(views: { readonly wren?: Views } = {}): TwoPeople {
  const wren = onePerson(undefined, undefined, views.wren);
  const otto = onePerson();
  const remote = { from: "a colleague" };
  let connected = true;
  const pass = (to: Person) => (update: Uint8Array, origin: unknown) => {
    if (connected && origin !== remote) Y.applyUpdate(to.doc, update, remote);
  };
  wren.doc.on("update", pass(otto));
  otto.doc.on("update", pass(wren));
  return {
    wren,
    otto,
    disconnect: () => {
      connected = false;
    },
    reconnect: () => {
      connected = true;
      const [ofWren, ofOtto] = [Y.encodeStateAsUpdate(wren.doc), Y.encodeStateAsUpdate(otto.doc)];
      Y.applyUpdate(otto.doc, ofWren, remote);
      Y.applyUpdate(wren.doc, ofOtto, remote);
    },
    leave: () => {
      wren.editor.destroy();
      otto.editor.destroy();
    },
  };
}

/** Types as a keyboard does: input rules see every letter. */
export function type(editor: Editor, text: string): void {
  for (const letter of text) {
    const { from, to } = editor.state.selection;
    const handled = editor.view.someProp("handleTextInput", (handle) =>
      handle(editor.view, from, to, letter, () => editor.state.tr.insertText(letter, from, to)),
    );
    if (!handled) editor.view.dispatch(editor.state.tr.insertText(letter, from, to));
  }
}

function sessionOn(ydoc: Y.Doc, history: NotebookHistory): NotebookSession {
  return {
    notebookId: "a notebook",
    source: { mode: "scratch", ydoc },
    ydoc,
    fragment: ydoc.getXmlFragment(FRAGMENT),
    awareness: new Awareness(ydoc),
    history,
    person: null,
    state: () => ({ phase: "scratch", unsaved: false, readOnly: false, loaded: true }),
    subscribe: () => () => undefined,
    destroy: () => undefined,
  };
}
