/** Prose: paragraphs, headings, lists, quotations, code, links and tables. */
import type { AnyExtension } from "@tiptap/core";
import { Blockquote } from "@tiptap/extension-blockquote";
import { Bold } from "@tiptap/extension-bold";
import { Code } from "@tiptap/extension-code";
import { CodeBlock } from "@tiptap/extension-code-block";
import { Document } from "@tiptap/extension-document";
import { HardBreak } from "@tiptap/extension-hard-break";
import { Heading } from "@tiptap/extension-heading";
import { HorizontalRule } from "@tiptap/extension-horizontal-rule";
import { Italic } from "@tiptap/extension-italic";
import { BulletList } from "@tiptap/extension-list/bullet-list";
import { ListItem } from "@tiptap/extension-list/item";
import { ListKeymap } from "@tiptap/extension-list/keymap";
import { OrderedList } from "@tiptap/extension-list/ordered-list";
import { Paragraph } from "@tiptap/extension-paragraph";
import { Strike } from "@tiptap/extension-strike";
import { Table, TableCell, TableHeader, TableRow } from "@tiptap/extension-table";
import { Text } from "@tiptap/extension-text";
import { Dropcursor } from "@tiptap/extensions/drop-cursor";
import { Gapcursor } from "@tiptap/extensions/gap-cursor";
import { Link } from "./link-mark.ts";

/**
 * A list item may begin with any block. The usual "paragraph first" is a fixed sequence: when one person deletes the
 * first paragraph while another turns the second into code, the merged item would be invalid and vanish for everyone.
 */
const listItemContent = "block+";

// One by one: a bundle of them all would bring a second history, which Yjs keeps per person, and more that is not used.
export const proseExtensions: readonly AnyExtension[] = [
  Bold,
  Blockquote,
  BulletList,
  Code,
  CodeBlock,
  Document,
  Dropcursor,
  Gapcursor,
  HardBreak,
  Heading.configure({ levels: [1, 2, 3] }),
  HorizontalRule,
  Italic,
  ListItem.extend({ content: listItemContent }),
  ListKeymap,
  Link,
  OrderedList,
  Paragraph,
  Strike,
  Text,
  Table.configure({ resizable: false, allowTableNodeSelection: true }),
  TableRow,
  TableHeader,
  TableCell,
];
