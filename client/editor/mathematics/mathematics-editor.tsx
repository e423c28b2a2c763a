/** Opens the editor of a formula, whose code is fetched when it is first needed. */
import type { Editor } from "@tiptap/core";
import { useSyncExternalStore } from "react";
import { fetched } from "../../ui/fetched.tsx";
import type { FormulaEditorProps } from "./formula-editor.tsx";
import type { MathEditing } from "./math-editing.ts";

export const formulaEditor = fetched<FormulaEditorProps>(
  async () => (await import("./formula-editor.tsx")).FormulaEditor,
);

interface MathematicsEditorProps {
  readonly editor: Editor;
  readonly editing: MathEditing;
}

export function MathematicsEditor({ editor, editing }: MathematicsEditorProps) {
  const opening = useSyncExternalStore(editing.subscribe, editing.current);
  if (!opening) return null;
  // One editor per opening: its draft starts from the formula that was opened.
  return (
    <formulaEditor.Part key={opening.count} {...{ editor, editing, opening }} onMissing={editing.close} />
  );
}
