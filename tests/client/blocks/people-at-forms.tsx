/** People at the forms of one notebook: real documents, presence, history and engine; the network is in the test's hands. */
import type { JSONContent } from "@tiptap/core";
import { prosemirrorJSONToYXmlFragment } from "@tiptap/y-tiptap";
import { render, type RenderResult } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { applyAwarenessUpdate, Awareness, encodeAwarenessUpdate } from "y-protocols/awareness";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { BlockHandleContext } from "../../../client/blocks/block-handle.ts";
import { BlockFrame } from "../../../client/blocks/frame.tsx";
import {
  BlockWorldContext,
  createBlockWorld,
  type BlockWorld,
} from "../../../client/editor/blocks/block-world.ts";
import { useBlockHandle } from "../../../client/editor/blocks/use-block-handle.ts";
import { ResultsContext } from "../../../client/editor/evaluation/use-results.ts";
import { createHistory } from "../../../client/editor/history.ts";
import type { NotebookSession } from "../../../client/editor/notebook-session.ts";
import { workerInProcess } from "../evaluation/worker-in-process.ts";

export interface PersonAtForms {
  readonly name: string;
  readonly doc: Y.Doc;
  readonly awareness: Awareness;
  readonly world: BlockWorld;
  readonly screen: RenderResult;
  readonly user: ReturnType<typeof userEvent.setup>;
  setReadOnly(readOnly: boolean): void;
  leave(): void;
}

function Block({ blockId }: { readonly blockId: string }) {
  const handle = useBlockHandle(blockId);
  if (!handle) return <p>the block is gone</p>;
  return (
    <BlockHandleContext value={handle}>
      <BlockFrame selected={false} onKeyDown={() => undefined} />
    </BlockHandleContext>
  );
}

export function personAtForms(
  name: string,
  clientId: number,
  state: Uint8Array,
  blockIds: readonly string[],
): PersonAtForms {
  const doc = new Y.Doc();
  doc.clientID = clientId;
  Y.applyUpdate(doc, state);
  const awareness = new Awareness(doc);
  awareness.setLocalState({ user: { id: name.toLowerCase(), name } });
  const history = createHistory(doc);
  const listeners = new Set<() => void>();
  let connection = { phase: "connected", unsaved: false, readOnly: false, loaded: true } as ReturnType<
    NotebookSession["state"]
  >;
  const session: NotebookSession = {
    notebookId: "n",
    source: { mode: "member" },
    ydoc: doc,
    fragment: doc.getXmlFragment(FRAGMENT),
    awareness,
    history,
    person: { id: name.toLowerCase(), name },
    state: () => connection,
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    destroy: () => undefined,
  };
  const world = createBlockWorld(session, workerInProcess);
  const page = render(
    <BlockWorldContext value={world}>
      <ResultsContext value={world.results}>
        {blockIds.map((blockId) => (
          <Block key={blockId} blockId={blockId} />
        ))}
      </ResultsContext>
    </BlockWorldContext>,
    // Each person's queries look at their own page only.
    { baseElement: document.body.appendChild(document.createElement("main")) },
  );
  return {
    name,
    doc,
    awareness,
    world,
    screen: page,
    user: userEvent.setup({ document }),
    setReadOnly(readOnly) {
      connection = { ...connection, readOnly };
      for (const listener of listeners) listener();
    },
    leave() {
      page.unmount();
      world.destroy();
      history.destroy();
      awareness.destroy();
      doc.destroy();
    },
  };
}

export function documentOf(content: JSONContent[]): Uint8Array {
  const doc = new Y.Doc();
  doc.clientID = 1;
  prosemirrorJSONToYXmlFragment(documentSchema, { type: "doc", content }, doc.getXmlFragment(FRAGMENT));
  return Y.encodeStateAsUpdate(doc);
}

/** What each has done reaches the other, presence included. */
export function exchange(first: PersonAtForms, second: PersonAtForms): void {
  for (const [from, to] of [
    [first, second],
    [second, first],
  ] as const) {
    Y.applyUpdate(to.doc, Y.encodeStateAsUpdate(from.doc, Y.encodeStateVector(to.doc)));
    applyAwarenessUpdate(to.awareness, encodeAwarenessUpdate(from.awareness, [from.doc.clientID]), "test");
  }
}
