/** A copy of the open document for one reader: it knows no server, no store and no other tab. */
import * as Y from "yjs";

export function copyDocument(document: Y.Doc): Y.Doc {
  const copy = new Y.Doc();
  Y.applyUpdate(copy, Y.encodeStateAsUpdate(document));
  return copy;
}
