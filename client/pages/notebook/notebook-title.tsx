import type { Notebook } from "#contract/api.ts";
import { roleMay } from "#contract/roles.ts";
import { useState } from "react";
import { useChangeNotebook } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { say } from "../../ui/notices.ts";
import "./notebook-title.css";

/** The title, which those who may rename change where it stands. */
export function NotebookTitle({ notebook }: { readonly notebook: Notebook }) {
  const mayRename = roleMay(notebook.role, "notebook.rename") && !notebook.archivedAt;
  return (
    <h1 className="notebook-title">
      {/* A title changed by someone else meanwhile starts the field afresh. */}
      {mayRename ? (
        <TitleField key={notebook.title} id={notebook.id} title={notebook.title} />
      ) : (
        notebook.title
      )}
    </h1>
  );
}

function TitleField({ id, title }: { readonly id: string; readonly title: string }) {
  const [typed, setTyped] = useState(title);
  const change = useChangeNotebook();
  const keep = () => {
    const wanted = typed.trim();
    if (wanted === title) return;
    if (wanted === "") {
      setTyped(title);
      say("A notebook needs a title; the old one was kept.", "refused");
      return;
    }
    change.mutate(
      { id, change: { title: wanted } },
      {
        onError: (error) => {
          setTyped(title);
          say(sentenceOf(error), "refused");
        },
      },
    );
  };
  return (
    <input
      aria-label="Title of the notebook"
      className="notebook-title-field"
      maxLength={300}
      value={typed}
      autoComplete="off"
      onChange={(event) => {
        setTyped(event.target.value);
      }}
      onBlur={keep}
      onKeyDown={(event) => {
        if (event.key === "Enter") event.currentTarget.blur();
        if (event.key === "Escape") setTyped(title);
      }}
    />
  );
}
