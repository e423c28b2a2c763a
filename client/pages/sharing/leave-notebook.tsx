import { useState } from "react";
import { useNavigate } from "react-router-dom";
import { useRemovePerson } from "../../api/people.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { say } from "../../ui/notices.ts";
import { Section } from "./section.tsx";

interface Props {
  readonly notebookId: string;
  readonly title: string;
  readonly personId: string;
}

export function LeaveNotebook({ notebookId, title, personId }: Props) {
  const [asking, setAsking] = useState(false);
  const remove = useRemovePerson(notebookId);
  const navigate = useNavigate();
  return (
    <Section title="Leave" note="The notebook goes from your shelf. What you wrote stays in it.">
      <Button
        className="mt-4"
        onClick={() => {
          setAsking(true);
        }}
      >
        Leave this notebook
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => {
          setAsking(false);
        }}
        title={`Leave “${title}”?`}
        action="Leave"
        busy={remove.isPending}
        problem={remove.isError ? sentenceOf(remove.error) : null}
        onConfirm={() => {
          remove.mutate(personId, {
            onSuccess: () => {
              say(`You have left “${title}”.`);
              void navigate("/shelf");
            },
          });
        }}
      >
        <p>Only an owner can let you in again.</p>
      </ConfirmDialog>
    </Section>
  );
}
