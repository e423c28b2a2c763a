/** The writing surface: the order ruler, the section scale, the margin tick, the writing bar and the document itself. */
import type { Editor } from "@tiptap/core";
import { EditorContent, useEditor } from "@tiptap/react";
import { useEffect, useMemo, useState, useSyncExternalStore, type ReactNode } from "react";
import type { StoredResult } from "#contract/api.ts";
import { RulerPlace } from "../ruler/ruler-place.tsx";
import { say } from "../ui/notices.ts";
import { blockExtensions, blockViews } from "./blocks/block-extensions.ts";
import { useBlockWorld } from "./blocks/block-world.ts";
import { BlocksProvider, useBlocksEditor } from "./blocks/blocks-provider.tsx";
import { isFinal, type ConnectionState } from "./connection-words.ts";
import { editorExtensions } from "./editor-extensions.ts";
import { createMathEditing } from "./mathematics/math-editing.ts";
import { MathematicsEditor } from "./mathematics/mathematics-editor.tsx";
import { NotebookContext, type OpenNotebook } from "./notebook-context.ts";
import type { NotebookSession } from "./notebook-session.ts";
import { prepareInstruments } from "./prepare-instruments.ts";
import { MarginTick } from "./placing/margin-tick.tsx";
import { SectionScale } from "./section-scale.tsx";
import { WritingBar } from "./writing/writing-bar.tsx";

interface EditorSurfaceProps {
  readonly session: NotebookSession;
  readonly state: ConnectionState;
  /** What the server has stored; undefined while it is on its way. */
  readonly stored: readonly StoredResult[] | undefined;
  /** Drawn after the text, inside the open notebook. */
  readonly children?: ReactNode;
}

export function EditorSurface({ session, state, stored, children }: EditorSurfaceProps) {
  return (
    <BlocksProvider session={session} stored={stored}>
      <WritingSurface session={session} state={state}>
        {children}
      </WritingSurface>
    </BlocksProvider>
  );
}

function WritingSurface({ session, state, children }: Omit<EditorSurfaceProps, "stored">) {
  const world = useBlockWorld();
  const readOnly = state.readOnly || isFinal(state.phase);
  const editing = useMemo(() => createMathEditing(), []);
  const [indexOpen, setIndexOpen] = useState(false);
  const extensions = useMemo(
    () =>
      editorExtensions({
        session,
        editing,
        views: blockViews,
        others: blockExtensions(world),
        openIndex: () => {
          setIndexOpen(true);
        },
      }),
    [session, editing, world],
  );
  const editor = useEditor(
    {
      extensions,
      editable: !readOnly,
      // Our own style sheet has these rules; a strict Content-Security-Policy refuses injected ones.
      injectCSS: false,
      shouldRerenderOnTransaction: false,
      editorProps: readOnly ? readingProps : writingProps,
    },
    [extensions],
  );
  // A role that changes while the page is open changes what the text is to assistive technology, too.
  useEffect(() => {
    editor.setOptions({ editable: !readOnly, editorProps: readOnly ? readingProps : writingProps });
  }, [editor, readOnly]);
  useBlocksEditor(editor);
  useHistoryWords(session);
  useCaretOnBlankPage(editor, readOnly);
  useEffect(() => (readOnly ? undefined : prepareInstruments()), [readOnly]);

  const notebook = useMemo<OpenNotebook>(() => ({ session, editor, readOnly }), [session, editor, readOnly]);
  return (
    <NotebookContext value={notebook}>
      <RulerPlace />
      <div className="notebook-surface">
        <SectionScale editor={editor} />
        <div className="notebook-column">
          {!readOnly && <WritingBar editor={editor} />}
          {!readOnly && <MarginTick editor={editor} open={indexOpen} onOpenChange={setIndexOpen} />}
          <EditorContent editor={editor} />
        </div>
        {!readOnly && <MathematicsEditor editor={editor} editing={editing} />}
      </div>
      {children}
    </NotebookContext>
  );
}

const named = { class: "prose", "aria-label": "Notebook text" };
// What is scrolled to must not end under the writing bar.
const room = { top: 120, bottom: 80, left: 0, right: 0 };
const writingProps = {
  attributes: { ...named, role: "textbox", "aria-multiline": "true", spellcheck: "true" },
  scrollMargin: room,
  scrollThreshold: room,
};
const readingProps = { attributes: { ...named, role: "document" } };

/** Whoever opens a blank page means to write: the caret is there, unless the focus has gone somewhere by then. */
function useCaretOnBlankPage(editor: Editor, readOnly: boolean): void {
  useEffect(() => {
    const { activeElement, body } = document;
    const isFree = activeElement === null || activeElement === body || activeElement.id === "main";
    if (!readOnly && editor.isEmpty && isFree) editor.commands.focus("start");
    // Only when the page opens: a text that is emptied later asks for nothing.
    // eslint-disable-next-line react-hooks/exhaustive-deps -- see above
  }, [editor]);
}

/** Says when a step of the history had no effect any more. */
function useHistoryWords({ history }: NotebookSession): void {
  const { message } = useSyncExternalStore(history.subscribe, history.state);
  useEffect(() => {
    if (message) say(message.text, "refused");
  }, [message]);
}
