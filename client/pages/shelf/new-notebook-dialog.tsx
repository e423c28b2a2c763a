import { templateNames, templateWords, type Template } from "#contract/templates.ts";
import { useState } from "react";
import { useNavigate } from "react-router-dom";
import { useCreateNotebook } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { Dialog } from "../../ui/dialog.tsx";
import { Choice, TextField } from "../../ui/field.tsx";
import { Refusal } from "../../ui/refusal.tsx";

interface Props {
  readonly open: boolean;
  readonly onClose: () => void;
}

export function NewNotebookDialog({ open, onClose }: Props) {
  return (
    <Dialog open={open} onClose={onClose} title="New notebook">
      <NewNotebookForm onClose={onClose} />
    </Dialog>
  );
}

function NewNotebookForm({ onClose }: { readonly onClose: () => void }) {
  const [title, setTitle] = useState("");
  const [template, setTemplate] = useState<Template>("blank");
  const create = useCreateNotebook();
  const navigate = useNavigate();
  const make = () => {
    const wanted = title.trim();
    create.mutate(
      { template, ...(wanted === "" ? {} : { title: wanted }) },
      { onSuccess: (notebook) => void navigate(`/notebooks/${notebook.id}`) },
    );
  };
  return (
    <form
      className="mt-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (!create.isPending) make();
      }}
    >
      <TextField
        label="Title"
        hint="Can be changed at any time."
        placeholder="Untitled notebook"
        maxLength={300}
        value={title}
        onValue={setTitle}
      />
      <fieldset className="mt-5 space-y-3">
        <legend className="mb-1 text-small font-medium text-ink-2">Begin with</legend>
        {templateNames.map((name) => (
          <Choice
            key={name}
            type="radio"
            name="template"
            label={templateWords[name].label}
            {...(templateWords[name].hint === "" ? {} : { hint: templateWords[name].hint })}
            checked={template === name}
            onChecked={() => {
              setTemplate(name);
            }}
          />
        ))}
      </fieldset>
      <Refusal sentence={create.isError ? sentenceOf(create.error) : null} />
      <div className="mt-6 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Cancel</Button>
        <Button look="main" type="submit" busy={create.isPending}>
          Make the notebook
        </Button>
      </div>
    </form>
  );
}
