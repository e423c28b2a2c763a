/** Opens the list of pinnable numbers from outside React: a shortcut, or the index of what can be placed. */
import { Extension, type AnyExtension, type Editor } from "@tiptap/core";

const openers = new WeakMap<Editor, () => void>();

export function offerPinPicker(editor: Editor, open: () => void): () => void {
  openers.set(editor, open);
  return () => openers.delete(editor);
}

export function openPinPicker(editor: Editor): void {
  openers.get(editor)?.();
}

/** Beside the shortcut of the index, with Shift. */
export const PIN_SHORTCUT = "Mod-Shift-.";

export const PinShortcut: AnyExtension = Extension.create({
  name: "pinShortcut",
  // Before the index's own shortcut, which would take the key with Shift for its own.
  priority: 1050,
  addKeyboardShortcuts() {
    return {
      [PIN_SHORTCUT]: () => {
        openPinPicker(this.editor);
        return true;
      },
    };
  },
});
