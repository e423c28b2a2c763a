/** The shared document as ProseMirror's JSON, as far as results depend on it: nodes and attributes, without text. */
import * as Y from "yjs";

interface JsonNode {
  readonly type: string;
  readonly attrs: Readonly<Record<string, unknown>>;
  readonly content: JsonNode[];
}

/** Total, and without recursion: a document may be nested deeper than the call stack. */
export function readFragment(fragment: Y.XmlFragment): JsonNode {
  const root: JsonNode = { type: "doc", attrs: {}, content: [] };
  const waiting: (readonly [Y.XmlFragment, JsonNode])[] = [[fragment, root]];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const [parent, into] = next;
    for (const child of parent.toArray()) {
      if (!(child instanceof Y.XmlElement)) continue;
      const node: JsonNode = { type: child.nodeName, attrs: child.getAttributes(), content: [] };
      into.content.push(node);
      waiting.push([child, node]);
    }
  }
  return root;
}
