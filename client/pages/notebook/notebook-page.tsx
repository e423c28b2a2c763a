import type { ServerNotice } from "#contract/collab.ts";
import { useQueryClient } from "@tanstack/react-query";
import { lazy, Suspense, useCallback } from "react";
import { useParams } from "react-router-dom";
import { useMe } from "../../api/me.ts";
import { notebookKey, shelfKey, useNotebook } from "../../api/notebooks.ts";
import { peopleKey } from "../../api/people.ts";
import { isNotFound, sentenceOf } from "../../api/problem.ts";
import { resultsKey, useStoredResults } from "../../api/results.ts";
import { Button } from "../../ui/button.tsx";
import { Loading } from "../../ui/loading.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { TextLink } from "../../ui/text-link.tsx";
import { ConnectionWords } from "./connection-words.tsx";
import { NotebookMenu } from "./notebook-menu.tsx";
import { NotebookTitle } from "./notebook-title.tsx";
import { PeopleHere } from "./people-here.tsx";
import { PinsToLookAt } from "./pins-to-look-at.tsx";
import { useReturnsAfterLapse } from "./returns-after-lapse.ts";

// Asked for as soon as this page is, beside the notebook's own facts and not after them.
const editorModule = import("../../editor/notebook-editor.tsx");
const NotebookEditor = lazy(async () => ({ default: (await editorModule).NotebookEditor }));

const member = { mode: "member" } as const;

/** The frame of a notebook: its title, who is here, the state of the connection, and the editor in the page. */
export function NotebookPage() {
  const { id = "" } = useParams();
  const notebook = useNotebook(id);
  const stored = useStoredResults(id).data?.results;
  const person = useMe().data?.person;
  const heedNotice = useNoticeFromServer(id);
  const returns = useReturnsAfterLapse();

  if (notebook.isPending) {
    return (
      <PageFrame title="Notebook">
        <Loading what="Opening the notebook" />
      </PageFrame>
    );
  }
  if (!notebook.data || !person) {
    return (
      <PageFrame title="Notebook" width="measure">
        <h1 className="font-prose text-title leading-tight">
          {isNotFound(notebook.error)
            ? "This notebook is not open to you"
            : "The notebook could not be opened"}
        </h1>
        <Refusal sentence={sentenceOf(notebook.error)} />
        <p className="mt-6 flex flex-wrap gap-4">
          {!isNotFound(notebook.error) && <Button onClick={() => void notebook.refetch()}>Try again</Button>}
          <TextLink look="plain" to="/shelf">
            To the shelf
          </TextLink>
        </p>
      </PageFrame>
    );
  }
  const { title, role, schemaVersion, archivedAt } = notebook.data;
  return (
    <PageFrame
      title={title}
      heading={<NotebookTitle notebook={notebook.data} />}
      instruments={
        <>
          {archivedAt && <span className="text-ink-2">archived: reading only</span>}
          <PinsToLookAt />
          <ConnectionWords />
          <PeopleHere />
          <TextLink look="quiet" className="text-small" to={`/notebooks/${id}/sharing`}>
            Sharing
          </TextLink>
          <NotebookMenu notebook={notebook.data} />
        </>
      }
    >
      <Suspense fallback={<Loading what="Opening the notebook" />}>
        <NotebookEditor
          key={returns}
          notebookId={id}
          source={member}
          role={role}
          person={person}
          schemaVersion={schemaVersion}
          stored={stored}
          onNotice={heedNotice}
        />
      </Suspense>
    </PageFrame>
  );
}

/** What changed on the server, told over the socket, is fetched again. */
function useNoticeFromServer(id: string): (notice: ServerNotice) => void {
  const client = useQueryClient();
  return useCallback(
    (notice) => {
      const refetch = (queryKey: readonly string[]) => void client.invalidateQueries({ queryKey });
      if (notice.about === "results") refetch(resultsKey(id));
      if (notice.about === "notebook" || notice.about === "read-only" || notice.about === "writable") {
        refetch(notebookKey(id));
        refetch(peopleKey(id));
      }
      if (notice.about === "results" || notice.about === "notebook") refetch(shelfKey);
    },
    [client, id],
  );
}
