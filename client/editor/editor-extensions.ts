/** The document's extensions with everything an editor adds: views, collaboration, typing, numbering, pasting. */
import { Extension, Node, type AnyExtension, type NodeViewRenderer } from "@tiptap/core";
import { documentExtensions } from "#schema/document-schema.ts";
import { collaborationExtensions } from "./collaboration.ts";
import { mathNodeView } from "./mathematics/math-node-view.ts";
import type { MathEditing } from "./mathematics/math-editing.ts";
import { mathematicsTyping } from "./mathematics/mathematics-typing.ts";
import type { NotebookSession } from "./notebook-session.ts";
import { NumberingExtension } from "./numbering.ts";
import { OwnSelection } from "./own-selection.ts";
import { Pasting } from "./pasting.ts";

export interface EditorWiring {
  readonly session: NotebookSession;
  readonly editing: MathEditing;
  /** Views by node name, for blocks and pins. */
  readonly views: Readonly<Record<string, NodeViewRenderer>>;
  /** Behaviour that goes with the views. */
  readonly others: readonly AnyExtension[];
  /** Opens the index of what can be placed. */
  openIndex(): void;
}

export function editorExtensions({
  session,
  editing,
  views,
  others,
  openIndex,
}: EditorWiring): AnyExtension[] {
  const drawn = { inlineMath: mathNodeView(editing), displayMath: mathNodeView(editing), ...views };
  return [
    ...documentExtensions.map((extension) => withView(extension, drawn)),
    ...collaborationExtensions(session),
    mathematicsTyping(session.history),
    NumberingExtension,
    Pasting,
    OwnSelection,
    ...others,
    Extension.create({
      name: "indexShortcut",
      addKeyboardShortcuts: () => ({
        [INDEX_SHORTCUT]: () => {
          openIndex();
          return true;
        },
      }),
    }),
  ];
}

/** Opens the index of what can be placed; shown in the margin tick's tooltip. */
export const INDEX_SHORTCUT = "Mod-.";

function withView(extension: AnyExtension, views: Readonly<Record<string, NodeViewRenderer>>): AnyExtension {
  const view = views[extension.name];
  return view && extension instanceof Node ? extension.extend({ addNodeView: () => view }) : extension;
}
