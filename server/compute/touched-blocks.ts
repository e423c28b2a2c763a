/** Remembers whose committed change touched which block, until the results of that change are stored. */
import * as Y from "yjs";
import { kindNames } from "#engine/index.ts";
import { FRAGMENT } from "#contract/collab.ts";
import { CommittedBy } from "../collab/committed-document.ts";

export interface Touched {
  /** By block id; null when the account is gone. */
  readonly blocks: ReadonlyMap<string, string | null>;
  /** Who last added or removed a node: a block may change because the premises it stood on went. */
  readonly structure: string | null;
  /** Who changed anything last. */
  readonly last: string | null;
  /** False when only text was typed, which no result depends on. */
  readonly mayChangeResults: boolean;
  readonly anything: boolean;
}

const kinds: ReadonlySet<string> = new Set(kindNames);

export class TouchedBlocks {
  #blocks = new Map<string, string | null>();
  #structure: string | null = null;
  #last: string | null = null;
  #mayChangeResults = false;
  #anything = false;

  /** `onMistake` is told of an exception of ours; thrown, it would look as if the change could not be applied. */
  constructor(document: Y.Doc, onMistake: (error: unknown) => void) {
    // Makes the root what it is; until then Yjs holds it as a type without a kind.
    document.getXmlFragment(FRAGMENT);
    // Not `observeDeep`: it sorts events by their paths, and counts all earlier siblings anew for each of them.
    document.on("afterTransaction", (transaction) => {
      if (!(transaction.origin instanceof CommittedBy) || transaction.changed.size === 0) return;
      try {
        this.#note(transaction, transaction.origin.personId);
      } catch (error) {
        this.#mayChangeResults = true;
        onMistake(error);
      }
    });
  }

  /** What was touched since this was asked last. */
  take(): Touched {
    const touched = {
      blocks: this.#blocks,
      structure: this.#structure,
      last: this.#last,
      mayChangeResults: this.#mayChangeResults,
      anything: this.#anything,
    };
    this.#blocks = new Map();
    this.#structure = null;
    this.#last = null;
    this.#mayChangeResults = this.#anything = false;
    return touched;
  }

  /** Puts back what could not be stored; newer touches win. */
  giveBack(touched: Touched): void {
    this.#blocks = new Map([...touched.blocks, ...this.#blocks]);
    this.#structure ??= touched.structure;
    this.#last ??= touched.last;
    this.#mayChangeResults ||= touched.mayChangeResults;
    this.#anything ||= touched.anything;
  }

  #note(transaction: Y.Transaction, personId: string | null): void {
    this.#anything = true;
    this.#last = personId;
    for (const [node, what] of transaction.changed) {
      if (!(node instanceof Y.XmlFragment) || node._item?.deleted === true) continue;
      this.#mayChangeResults = true;
      const within = enclosingBlock(node);
      if (within !== null) {
        this.#blocks.set(within, personId);
        continue;
      }
      this.#structure = personId;
      // Null stands for the list of children, texts for attributes.
      if (!what.has(null)) continue;
      for (const child of addedTo(node, transaction))
        for (const blockId of blocksIn(child)) this.#blocks.set(blockId, personId);
    }
  }
}

function addedTo(node: Y.XmlFragment, { beforeState }: Y.Transaction): readonly unknown[] {
  const added: unknown[] = [];
  for (let item = node._start; item !== null; item = item.right) {
    const { client, clock } = item.id;
    const isNew = clock >= (beforeState.get(client) ?? 0);
    if (isNew && !item.deleted && item.content instanceof Y.ContentType) added.push(item.content.type);
  }
  return added;
}

/** The id of the block that a node is or lies in; null in prose. */
function enclosingBlock(node: Y.XmlFragment | Y.XmlText): string | null {
  for (let at: unknown = node; at instanceof Y.XmlFragment || at instanceof Y.XmlText; at = at.parent)
    if (isBlock(at)) return at.getAttribute("blockId") ?? "";
  return null;
}

function blocksIn(node: unknown): readonly string[] {
  const found: string[] = [];
  const waiting: unknown[] = [node];
  while (waiting.length > 0) {
    const next = waiting.pop();
    if (isBlock(next)) found.push(next.getAttribute("blockId") ?? "");
    else if (next instanceof Y.XmlFragment) waiting.push(...next.toArray());
  }
  return found;
}

function isBlock(node: unknown): node is Y.XmlElement<{ blockId: string }> {
  return node instanceof Y.XmlElement && kinds.has(node.nodeName);
}
