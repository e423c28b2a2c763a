import { useState } from "react";
import { useChangeNotebook } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { Dialog } from "../../ui/dialog.tsx";
import { TextField } from "../../ui/field.tsx";

interface Props {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly id: string;
  readonly title: string;
}

export function RenameDialog(props: Props) {
  return (
    <Dialog open={props.open} onClose={props.onClose} title="Rename the notebook">
      <RenameForm {...props} />
    </Dialog>
  );
}

function RenameForm({ onClose, id, title }: Props) {
  const [typed, setTyped] = useState(title);
  const change = useChangeNotebook();
  const wanted = typed.trim();
  const problem =
    wanted === "" ? "A notebook needs a title." : change.isError ? sentenceOf(change.error) : null;
  return (
    <form
      className="mt-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (wanted === "" || change.isPending) return;
        if (wanted === title) onClose();
        else change.mutate({ id, change: { title: wanted } }, { onSuccess: onClose });
      }}
    >
      <TextField label="Title" maxLength={300} value={typed} onValue={setTyped} error={problem} />
      <div className="mt-6 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Cancel</Button>
        <Button look="main" type="submit" busy={change.isPending}>
          Rename
        </Button>
      </div>
    </form>
  );
}
