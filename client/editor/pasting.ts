/** What is pasted gets an identity of its own, and typed mathematics in it becomes mathematics. */
import { Extension, type AnyExtension } from "@tiptap/core";
import { Fragment, Slice, type Node, type Schema } from "@tiptap/pm/model";
import { Plugin } from "@tiptap/pm/state";
import { kindDescriptions } from "#engine/descriptions.ts";
import { kindNames, type KindName } from "#engine/kind.ts";
import type { Columns } from "#engine/shape.ts";
import { pinNode, rowNode } from "#schema/block-structure.ts";
import { isSafeLink } from "#schema/safe-link.ts";
import { newId } from "./new-id.ts";

const kinds: ReadonlySet<string> = new Set(kindNames);

export const Pasting: AnyExtension = Extension.create({
  name: "pasting",
  addProseMirrorPlugins() {
    const { editor } = this;
    // A drop that moves something within the document leaves it who it is; one that copies does not.
    let moves = false;
    // What was cut comes back as itself, so that pins and references still know it; a second time it is a copy.
    let cut: ReadonlySet<string> = new Set();
    return [
      new Plugin({
        props: {
          handleDOMEvents: {
            cut: (view) => {
              cut = identitiesIn(view.state.selection.content().content);
              return false;
            },
            copy: () => {
              cut = new Set();
              return false;
            },
            drop: (view, event) => {
              moves = view.dragging !== null && !copies(event);
              // ProseMirror takes the drop within this event.
              queueMicrotask(() => {
                moves = false;
              });
              return false;
            },
          },
          dragCopies: copies,
          transformPasted: (slice, view) => {
            const read = withMathematics(withoutUnsafeLinks(slice), editor.schema);
            if (moves) return read;
            const here = cut.size === 0 ? cut : identitiesIn(view.state.doc.content);
            return withFreshIds(read, newId, (id) => cut.has(id) && !here.has(id));
          },
        },
      }),
    ];
  },
});

/** The system's own key for copying instead of moving. */
function copies(event: DragEvent): boolean {
  return /Mac|iPhone|iPad/.test(navigator.userAgent) ? event.altKey : event.ctrlKey;
}

/** Ids by which others know blocks and equations. */
function identitiesIn(content: Fragment): ReadonlySet<string> {
  const found = new Set<string>();
  content.descendants((node) => {
    if (kinds.has(node.type.name)) found.add(textOf(node, "blockId"));
    else if (node.type.name === "displayMath") found.add(textOf(node, "id"));
    return !kinds.has(node.type.name);
  });
  found.delete("");
  return found;
}

/**
 * Blocks, rows, pins and equations of the slice under new ids, but for blocks and equations to be kept. What points at a block within the slice points at its
 * copy; what points outside keeps pointing there. Row ids also occur in pins, as the first part of a scalar's name.
 */
export function withFreshIds(
  slice: Slice,
  makeId: () => string = newId,
  isKept: (id: string) => boolean = () => false,
): Slice {
  const blocks = new Map<string, string>();
  const rows = new Map<string, ReadonlyMap<string, string>>();
  slice.content.descendants((node) => {
    if (!kinds.has(node.type.name)) return true;
    const blockId = textOf(node, "blockId");
    // Of two blocks with one id in the slice, pins can mean only one: the first.
    if (!blocks.has(blockId)) {
      const kept = isKept(blockId);
      blocks.set(blockId, kept ? blockId : makeId());
      rows.set(blockId, kept ? sameRows(node) : freshRows(node, makeId));
    }
    return false;
  });
  const taken = new Set<string>();

  function freshBlock(node: Node): Node {
    const blockId = textOf(node, "blockId");
    const first = !taken.has(blockId);
    taken.add(blockId);
    const rowIds = first ? rows.get(blockId) : freshRows(node, makeId);
    const standsOn = textOf(node, "standsOn");
    const { shape } = kindDescriptions[node.type.name as KindName]; // only nodes of kinds come here
    const attributes = {
      ...referring(node.attrs, shape.fields, blocks),
      blockId: first ? blocks.get(blockId) : makeId(),
      standsOn: blocks.get(standsOn) ?? standsOn,
    };
    const content = mapChildren(node.content, (row) =>
      row.type.name === rowNode
        ? row.type.create(
            { ...row.attrs, rowId: rowIds?.get(textOf(row, "rowId")) ?? makeId() },
            mapChildren(row.content, (cell) => freshCell(cell, shape.tables[textOf(row, "table")] ?? {})),
            row.marks,
          )
        : row,
    );
    return node.type.create(attributes, content, node.marks);
  }

  function freshCell(cell: Node, columns: Columns): Node {
    const value = textOf(cell, "value");
    const copy = columns[textOf(cell, "field")]?.refersTo ? blocks.get(value) : undefined;
    return copy === undefined ? cell : cell.type.create({ ...cell.attrs, value: copy }, null, cell.marks);
  }

  function fresh(node: Node): Node {
    const { name } = node.type;
    if (kinds.has(name)) return freshBlock(node);
    if (name === pinNode) {
      const blockId = textOf(node, "blockId");
      const scalar = scalarIn(textOf(node, "scalar"), rows.get(blockId));
      const attributes = { ...node.attrs, pinId: makeId(), blockId: blocks.get(blockId) ?? blockId, scalar };
      return node.type.create(attributes, null, node.marks);
    }
    if (name === "displayMath" && !isKept(textOf(node, "id")))
      return node.type.create({ ...node.attrs, id: makeId() }, null, node.marks);
    return node.content.size === 0 ? node : node.copy(mapChildren(node.content, fresh));
  }
  return new Slice(mapChildren(slice.content, fresh), slice.openStart, slice.openEnd);
}

/** `Scalar.id` begins with a row id: "r4/size". Names such as "plan/order" have none and stay. */
function scalarIn(scalar: string, rowIds: ReadonlyMap<string, string> | undefined): string {
  const [first = "", ...others] = scalar.split("/");
  const fresh = rowIds?.get(first);
  return fresh === undefined ? scalar : [fresh, ...others].join("/");
}

/** Fields that name another block name its copy, when it is copied along. */
function referring(
  attrs: Node["attrs"],
  fields: Columns,
  blocks: ReadonlyMap<string, string>,
): Readonly<Record<string, unknown>> {
  return Object.fromEntries(
    Object.entries(attrs as Readonly<Record<string, unknown>>).map(([name, value]) => [
      name,
      fields[name]?.refersTo && typeof value === "string" ? (blocks.get(value) ?? value) : value,
    ]),
  );
}

function sameRows(block: Node): ReadonlyMap<string, string> {
  return new Map(block.children.map((row) => [textOf(row, "rowId"), textOf(row, "rowId")]));
}

function freshRows(block: Node, makeId: () => string): ReadonlyMap<string, string> {
  const ids = new Map<string, string>();
  block.forEach((row) => {
    if (row.type.name === rowNode) ids.set(textOf(row, "rowId"), makeId());
  });
  return ids;
}

/** Links to addresses that are not safe become plain words. */
export function withoutUnsafeLinks(slice: Slice): Slice {
  const clean = (node: Node): Node => {
    const marks = node.marks.filter((mark) => mark.type.name !== "link" || isSafeLink(mark.attrs["href"]));
    const kept = marks.length === node.marks.length ? node : node.mark(marks);
    return kept.isText || kept.content.size === 0 ? kept : kept.copy(mapChildren(kept.content, clean));
  };
  return new Slice(mapChildren(slice.content, clean), slice.openStart, slice.openEnd);
}

/** `$…$` in pasted prose becomes mathematics; a paragraph that is `$$…$$` alone becomes a displayed equation. */
export function withMathematics(slice: Slice, schema: Schema): Slice {
  const inlineMath = schema.nodes["inlineMath"];
  const displayMath = schema.nodes["displayMath"];
  if (!inlineMath || !displayMath) return slice;
  const [inline, displayed] = [inlineMath, displayMath];

  function inText(text: Node): readonly Node[] {
    const source = text.text ?? "";
    if (!source.includes("$") || text.marks.some((mark) => mark.type.name === "code")) return [text];
    const parts: Node[] = [];
    let rest = 0;
    for (const found of source.matchAll(
      /(?<![\\$])\$(?![\s$])((?:[^$\\]|\\.)*?[^\s$\\]|\\[^\s$])\$(?![\d$])/g,
    )) {
      if (found.index > rest) parts.push(schema.text(source.slice(rest, found.index), text.marks));
      parts.push(inline.create({ latex: found[1] ?? "" }, null, text.marks));
      rest = found.index + found[0].length;
    }
    if (rest < source.length) parts.push(schema.text(source.slice(rest), text.marks));
    return parts;
  }
  function read(node: Node): readonly Node[] {
    if (node.isText) return inText(node);
    if (node.type.spec.code || kinds.has(node.type.name) || node.isLeaf) return [node];
    const alone =
      node.type.name === "paragraph" ? /^\s*\$\$([^$]+)\$\$\s*$/.exec(node.textContent)?.[1] : undefined;
    if (alone !== undefined && node.content.childCount === 1) {
      return [displayed.create({ latex: alone.trim(), label: "", id: newId() })];
    }
    const children: Node[] = [];
    node.forEach((child) => children.push(...read(child)));
    return [node.copy(Fragment.fromArray(children))];
  }
  const top: Node[] = [];
  slice.content.forEach((node) => top.push(...read(node)));
  // A displayed equation cannot be open at either end, as a paragraph can.
  const openStart = top[0]?.type === displayMath ? 0 : slice.openStart;
  const openEnd = top.at(-1)?.type === displayMath ? 0 : slice.openEnd;
  return new Slice(Fragment.fromArray(top), openStart, openEnd);
}

function mapChildren(content: Fragment, change: (node: Node) => Node): Fragment {
  const children: Node[] = [];
  content.forEach((child) => children.push(change(child)));
  return Fragment.fromArray(children);
}

function textOf(node: Node, name: string): string {
  const value: unknown = node.attrs[name];
  return typeof value === "string" ? value : "";
}
