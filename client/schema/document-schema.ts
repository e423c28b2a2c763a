/** The shared document: the same nodes and marks on the server and in every editor. Views are added by the client. */
import { getSchema, type AnyExtension } from "@tiptap/core";
import type { Schema } from "@tiptap/pm/model";
import { kindDescriptions } from "#engine/descriptions.ts";
import { blockNodeOf, Cell, Row } from "./block-nodes.ts";
import { DisplayMath, InlineMath } from "./mathematics-nodes.ts";
import { Pin } from "./pin-node.ts";
import { proseExtensions } from "./prose-extensions.ts";

/** Tiptap extensions without views. Raise SCHEMA_VERSION when a node, mark or attribute of these changes. */
export const documentExtensions: readonly AnyExtension[] = [
  ...proseExtensions,
  InlineMath,
  DisplayMath,
  Pin,
  ...Object.values(kindDescriptions).map(blockNodeOf),
  Row,
  Cell,
];

/** The ProseMirror schema of the document. Needs no DOM. */
export const documentSchema: Schema = getSchema([...documentExtensions]);
