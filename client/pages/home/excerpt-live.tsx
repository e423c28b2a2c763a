import { prosemirrorJSONToYDoc } from "@tiptap/y-tiptap";
import { useState } from "react";
import { FRAGMENT } from "#contract/collab.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { NotebookEditor } from "../../editor/notebook-editor.tsx";
import { excerptDocument } from "./excerpt-document.ts";

/** A visitor has no role in a notebook that is nobody's. */
const nobody = { notebookId: "excerpt", role: null } as const;

/** The editor itself on a document of the reader's own, that is never sent. */
export function ExcerptLive() {
  const [source] = useState(() => ({
    mode: "scratch" as const,
    ydoc: prosemirrorJSONToYDoc(documentSchema, excerptDocument, FRAGMENT),
  }));
  return <NotebookEditor {...nobody} source={source} />;
}
