import { prosemirrorJSONToYDoc } from "@tiptap/y-tiptap";
import { useState } from "react";
import { FRAGMENT } from "#contract/collab.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { NotebookEditor } from "../../editor/notebook-editor.tsx";
import { specimenDocument } from "./notebook-document.ts";

/** A reader of a page of parts has no role in a notebook that is nobody's. */
const nobody = { notebookId: "specimen", role: null } as const;

/** The editor itself on an invented page; what is typed is neither kept nor sent. */
export function NotebookSpecimen() {
  const [source] = useState(() => ({
    mode: "scratch" as const,
    ydoc: prosemirrorJSONToYDoc(documentSchema, specimenDocument, FRAGMENT),
  }));
  return <NotebookEditor {...nobody} source={source} />;
}
