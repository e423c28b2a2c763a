import type { RefereeLinkCreated } from "#contract/api.ts";
import { useState } from "react";
import { sentenceOf } from "../../api/problem.ts";
import { useCreateRefereeLink } from "../../api/referee-links.ts";
import { Button } from "../../ui/button.tsx";
import { Choice, SelectField, TextField } from "../../ui/field.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { expiryChoices, expiryOf, type ExpiryChoice } from "./expiry.ts";

interface Props {
  readonly notebookId: string;
  readonly onMade: (made: RefereeLinkCreated) => void;
}

export function RefereeLinkForm({ notebookId, onMade }: Props) {
  const [name, setName] = useState("");
  const [choice, setChoice] = useState<ExpiryChoice>("90");
  const [day, setDay] = useState("");
  const [hideAuthors, setHideAuthors] = useState(false);
  const [asked, setAsked] = useState(false);
  const create = useCreateRefereeLink(notebookId);
  const expiry = expiryOf(choice, day, new Date());
  const nameProblem =
    name.trim() === "" ? "Give the link a name, so that you know later whom it was for." : null;

  const make = () => {
    setAsked(true);
    if (nameProblem || !expiry.ok || create.isPending) return;
    create.mutate(
      { name: name.trim(), expiresAt: expiry.expiresAt, hideAuthors },
      {
        onSuccess: (made) => {
          onMade(made);
          setName("");
          setAsked(false);
          // The answer holds the token: nothing here keeps it.
          create.reset();
        },
      },
    );
  };
  return (
    <form
      className="mt-6 space-y-4"
      noValidate
      aria-label="New referee link"
      onSubmit={(event) => {
        event.preventDefault();
        make();
      }}
    >
      <div className="grid gap-4 sm:grid-cols-[1fr_10rem] sm:items-start">
        <TextField
          label="Name of a new link"
          hint="Only seen by owners, such as “journal, first round”."
          maxLength={120}
          value={name}
          onValue={setName}
          error={asked ? nameProblem : null}
        />
        <SelectField label="Expires" value={choice} options={expiryChoices} onValue={setChoice} />
      </div>
      {choice === "date" && (
        <TextField
          label="Last day"
          type="date"
          className="max-w-48"
          value={day}
          onValue={setDay}
          error={asked && !expiry.ok ? expiry.sentence : null}
        />
      )}
      <Choice
        type="checkbox"
        label="Hide the authors"
        hint="No names, no “changed by”, nobody seen writing. Names in the prose itself stay."
        checked={hideAuthors}
        onChecked={setHideAuthors}
      />
      <Refusal sentence={create.isError ? sentenceOf(create.error) : null} />
      <Button look="main" type="submit" busy={create.isPending} busyLabel="Making the link">
        Make the link
      </Button>
    </form>
  );
}
