import { useParams } from "react-router-dom";
import { useMe } from "../../api/me.ts";
import { useNotebook } from "../../api/notebooks.ts";
import { isNotFound, sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { Loading } from "../../ui/loading.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { TextLink } from "../../ui/text-link.tsx";
import { NotebookTitle } from "./notebook-title.tsx";

/** The frame of a notebook: its title, who is here, the state of the connection, and the editor in the page. */
export function NotebookPage() {
  const { id = "" } = useParams();
  const notebook = useNotebook(id);
  const person = useMe().data?.person;

  if (notebook.isPending) {
    return (
      <PageFrame title="Notebook">
        <Loading what="Opening the notebook" />
      </PageFrame>
    );
  }
  if (!notebook.data || !person) {
    return (
      <PageFrame title="Notebook" narrow>
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
  return (
    <PageFrame
      title={notebook.data.title}
      heading={<NotebookTitle notebook={notebook.data} />}
      instruments={
        <TextLink look="quiet" className="text-small" to={`/notebooks/${id}/sharing`}>
          Sharing
        </TextLink>
      }
    >
      <Loading what="Opening the notebook" />
    </PageFrame>
  );
}
