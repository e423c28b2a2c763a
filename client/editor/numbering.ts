/** Numbers of sections and displayed equations, in document order: computed, never stored. */
import { Extension, type AnyExtension } from "@tiptap/core";
import type { Node } from "@tiptap/pm/model";
import { Plugin, PluginKey, type EditorState } from "@tiptap/pm/state";
import { Decoration, DecorationSet } from "@tiptap/pm/view";

export interface Section {
  readonly position: number;
  readonly level: number;
  /** "2.1". */
  readonly number: string;
  readonly text: string;
}
export interface Equation {
  readonly position: number;
  readonly number: number;
  readonly id: string;
  readonly label: string;
}
export interface Numbering {
  readonly sections: readonly Section[];
  readonly equations: readonly Equation[];
}

/**
 * Sections are the top-level headings. The highest level in use counts as the first, so that a notebook which begins
 * with second-level headings has sections 1, 2, 3 and not 0.1, 0.2, 0.3; a skipped level counts once.
 */
export function numberDocument(doc: Node): Numbering {
  const headings: { position: number; level: number; text: string }[] = [];
  const equations: Equation[] = [];
  doc.descendants((node, position, parent) => {
    if (node.type.name === "heading" && parent === doc) {
      headings.push({ position, level: Number(node.attrs["level"]), text: node.textContent });
    } else if (node.type.name === "displayMath") {
      const { id, label } = node.attrs;
      equations.push({ position, number: equations.length + 1, id: String(id), label: String(label) });
    }
    return !node.isTextblock;
  });
  return { sections: numberHeadings(headings), equations };
}

function numberHeadings(headings: readonly { position: number; level: number; text: string }[]): Section[] {
  const open: { level: number; count: number }[] = [];
  return headings.map((heading) => {
    while (open.length > 1 && (open.at(-1)?.level ?? 0) > heading.level) {
      // A heading between two levels in use takes the place of the deeper one.
      if ((open.at(-2)?.level ?? 0) < heading.level) break;
      open.pop();
    }
    const last = open.at(-1);
    if (last && last.level >= heading.level) {
      last.count += 1;
      last.level = heading.level;
    } else {
      open.push({ level: heading.level, count: 1 });
    }
    return { ...heading, number: open.map(({ count }) => count).join(".") };
  });
}

interface NumberingState {
  readonly numbering: Numbering;
  readonly decorations: DecorationSet;
}
const numberingKey = new PluginKey<NumberingState>("numbering");

/** The numbers of the document as it is. */
export function numberingOf(state: EditorState): Numbering {
  return numberingKey.getState(state)?.numbering ?? { sections: [], equations: [] };
}

export const NumberingExtension: AnyExtension = Extension.create({
  name: "numbering",
  addProseMirrorPlugins: () => [
    new Plugin<NumberingState>({
      key: numberingKey,
      state: {
        init: (_config, state) => numbered(state.doc),
        apply: (transaction, before, _old, state) => (transaction.docChanged ? numbered(state.doc) : before),
      },
      props: { decorations: (state) => numberingKey.getState(state)?.decorations ?? null },
    }),
  ],
});

function numbered(doc: Node): NumberingState {
  const numbering = numberDocument(doc);
  const mark = (position: number, number: string) => {
    const size = doc.nodeAt(position)?.nodeSize ?? 0;
    return Decoration.node(position, position + size, { "data-number": number });
  };
  const decorations = [
    ...numbering.sections.map(({ position, number }) => mark(position, number)),
    ...numbering.equations.map(({ position, number }) => mark(position, String(number))),
  ];
  return { numbering, decorations: DecorationSet.create(doc, decorations) };
}
