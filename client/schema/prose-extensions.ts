/** Prose: paragraphs, headings, lists, quotations, code, links and tables. */
import { Node, type AnyExtension } from "@tiptap/core";
import { Table, TableCell, TableHeader, TableRow } from "@tiptap/extension-table";
import StarterKit from "@tiptap/starter-kit";
import { isSafeLink } from "./safe-link.ts";

/**
 * A list item may begin with any block. The usual "paragraph first" is a fixed sequence: when one person deletes the
 * first paragraph while another turns the second into code, the merged item would be invalid and vanish for everyone.
 */
const listItemContent = "block+";

const Prose = StarterKit.extend({
  addExtensions() {
    const parts: AnyExtension[] = this.parent?.() ?? [];
    return parts.map((part) => {
      if (part.name === "listItem" && part instanceof Node) return part.extend({ content: listItemContent });
      if (part.name === "link") {
        // Only the address is stored: target, rel and class of a link are ours to choose, not a writer's.
        return part.extend({ addAttributes: () => ({ href: { default: null } }) });
      }
      return part;
    });
  },
}).configure({
  // Yjs keeps the history, per person.
  undoRedo: false,
  heading: { levels: [1, 2, 3] },
  underline: false,
  link: {
    openOnClick: false,
    autolink: true,
    linkOnPaste: true,
    defaultProtocol: "https",
    isAllowedUri: isSafeLink,
    shouldAutoLink: isSafeLink,
    HTMLAttributes: { rel: "noopener noreferrer nofollow", target: "_blank" },
  },
  // Its view adds an empty paragraph at the end by itself, which would be an edit nobody made.
  trailingNode: false,
});

export const proseExtensions: readonly AnyExtension[] = [
  Prose,
  Table.configure({ resizable: false, allowTableNodeSelection: true }),
  TableRow,
  TableHeader,
  TableCell,
];
