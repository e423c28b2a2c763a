import { prosemirrorJSONToYDoc } from "@tiptap/y-tiptap";
import { useState } from "react";
import { FRAGMENT } from "#contract/collab.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { NotebookEditor } from "../../editor/notebook-editor.tsx";
import { excerptDocument } from "./excerpt-document.ts";

/** The editor itself on a document of the reader's own, that is never sent. */
export function ExcerptLive() {
  const [source] = useState(() => ({
    mode: "scratch" as const,
    ydoc: prosemirrorJSONToYDoc(documentSchema, excerptDocument, FRAGMENT),
  }));
  return <NotebookEditor notebookId="excerpt" source={source} role={null} />;
}
