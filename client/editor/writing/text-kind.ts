/** What a paragraph can be. */
import type { Editor } from "@tiptap/core";

export interface TextKind {
  readonly id: "paragraph" | "heading-1" | "heading-2" | "heading-3" | "code";
  readonly title: string;
  isActive(editor: Editor): boolean;
  apply(editor: Editor): void;
}

function heading(level: 1 | 2 | 3, title: string): TextKind {
  return {
    id: `heading-${level}`,
    title,
    isActive: (editor) => editor.isActive("heading", { level }),
    apply: (editor) => void editor.chain().focus().setHeading({ level }).run(),
  };
}

export const textKinds: readonly TextKind[] = [
  {
    id: "paragraph",
    title: "paragraph",
    isActive: (editor) => editor.isActive("paragraph"),
    apply: (editor) => void editor.chain().focus().setParagraph().run(),
  },
  heading(1, "section"),
  heading(2, "subsection"),
  heading(3, "part of a subsection"),
  {
    id: "code",
    title: "code",
    isActive: (editor) => editor.isActive("codeBlock"),
    apply: (editor) => void editor.chain().focus().setCodeBlock().run(),
  },
];
