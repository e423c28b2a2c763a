/** Ties the editor to the shared document, the shared history, and colleagues' carets. */
import { Extension, type AnyExtension } from "@tiptap/core";
import { Collaboration } from "@tiptap/extension-collaboration";
import { Plugin } from "@tiptap/pm/state";
import { yCursorPlugin } from "@tiptap/y-tiptap";
import { FRAGMENT } from "#contract/collab.ts";
import type { NotebookSession } from "./notebook-session.ts";
import { personColor } from "./person-color.ts";
import { userOf } from "./presence.ts";

declare module "@tiptap/core" {
  interface Commands<ReturnType> {
    ownHistory: {
      /** What follows is a step of the history by itself, even if it comes at once. */
      startNewStep: () => ReturnType;
    };
  }
}

export function collaborationExtensions(session: NotebookSession): readonly AnyExtension[] {
  const { ydoc, history } = session;
  const shared = Collaboration.extend({
    addCommands: () => ({
      startNewStep:
        () =>
        ({ dispatch, tr }) => {
          tr.setMeta("preventDispatch", true);
          if (dispatch) history.startNewStep();
          return true;
        },
      undo:
        () =>
        ({ dispatch, tr }) => {
          // The history writes to the shared document; this ProseMirror transaction must not be dispatched beside it.
          tr.setMeta("preventDispatch", true);
          return dispatch ? history.undoOnce() !== "nothing" : history.state().canUndo;
        },
      redo:
        () =>
        ({ dispatch, tr }) => {
          tr.setMeta("preventDispatch", true);
          return dispatch ? history.redoOnce() !== "nothing" : history.state().canRedo;
        },
    }),
    addProseMirrorPlugins() {
      return [...(this.parent?.() ?? []), systemUndo(session)];
    },
  });
  return [
    shared.configure({ document: ydoc, field: FRAGMENT, yUndoOptions: { undoManager: history.manager } }),
    carets(session),
  ];
}

/** The undo of the system's own menus and gestures goes through the shared history too, never the browser's. */
function systemUndo({ history }: NotebookSession): Plugin {
  return new Plugin({
    props: {
      handleDOMEvents: {
        beforeinput(_view, event) {
          if (event.inputType !== "historyUndo" && event.inputType !== "historyRedo") return false;
          event.preventDefault();
          if (event.inputType === "historyUndo") history.undoOnce();
          else history.redoOnce();
          return true;
        },
      },
    },
  });
}

function carets({ awareness }: NotebookSession): AnyExtension {
  return Extension.create({
    name: "colleaguesCarets",
    priority: 999,
    addProseMirrorPlugins: () => [
      // The plugin's parameters are untyped; they are narrowed in the functions it is given.
      yCursorPlugin(awareness, {
        awarenessStateFilter: (own: number, other: number, state: unknown) =>
          own !== other && userOf(state) !== null && hasReadableCursor(state),
        cursorBuilder: (user: unknown) => drawCaret(user),
        selectionBuilder: (user: unknown) => ({
          class: "colleague-selection",
          style: `--person: ${personColor(userOf({ user })?.id ?? "")}`,
        }),
      }) as Plugin,
    ],
  });
}

function drawCaret(user: unknown): HTMLElement {
  const who = userOf({ user });
  const caret = document.createElement("span");
  caret.className = "colleague-caret";
  caret.style.setProperty("--person", personColor(who?.id ?? ""));
  const label = document.createElement("span");
  label.className = "colleague-caret-label";
  label.textContent = who?.name ?? "someone";
  // Word joiners keep the caret on the line of the letter it stands at.
  caret.append("\u2060", label, "\u2060");
  return caret;
}

/** A malformed position from a stranger would throw inside every editor that draws it. */
export function hasReadableCursor(state: unknown): boolean {
  if (!isRecord(state)) return false;
  const { cursor } = state;
  if (cursor === null || cursor === undefined) return true;
  return isRecord(cursor) && isRelativePosition(cursor["anchor"]) && isRelativePosition(cursor["head"]);
}

function isRelativePosition(value: unknown): boolean {
  if (!isRecord(value)) return false;
  const { type, tname, item, assoc } = value;
  return (
    isOptionalId(type) &&
    isOptionalId(item) &&
    (tname === null || tname === undefined || tname === FRAGMENT) &&
    (assoc === undefined || assoc === null || typeof assoc === "number")
  );
}

function isOptionalId(value: unknown): boolean {
  if (value === null || value === undefined) return true;
  return isRecord(value) && isCount(value["client"]) && isCount(value["clock"]);
}

function isCount(value: unknown): boolean {
  return typeof value === "number" && Number.isSafeInteger(value) && value >= 0;
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === "object" && value !== null;
}
