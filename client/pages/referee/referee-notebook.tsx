import type { RefereeView } from "#contract/api.ts";
import type { ServerNotice } from "#contract/collab.ts";
import { useMemo } from "react";
import type * as Y from "yjs";
import { NotebookEditor } from "../../editor/notebook-editor.tsx";
import type { Source } from "../../editor/notebook-session.ts";
import { CheckSheet } from "./check-sheet.tsx";

interface Props {
  readonly token: string;
  readonly view: RefereeView;
  /** The reader's own copy, while there is one. */
  readonly scratch: Y.Doc | null;
  readonly onNotice: (notice: ServerNotice) => void;
}

/** Whoever holds a link has no role in the notebook. */
const visitor = { role: null } as const;

/** The notebook as it is, read-only, or the reader's copy of it; and below either its check sheet. */
export function RefereeNotebook({ token, view, scratch, onNotice }: Props) {
  const source = useMemo<Source>(
    () => (scratch ? { mode: "scratch", ydoc: scratch } : { mode: "referee", token }),
    [token, scratch],
  );
  return (
    <NotebookEditor
      notebookId={view.notebookId}
      source={source}
      {...visitor}
      schemaVersion={view.schemaVersion}
      stored={view.results}
      onNotice={onNotice}
    >
      <CheckSheet stored={view.results} />
    </NotebookEditor>
  );
}
