import type { ReactNode } from "react";
import { Button } from "./button.tsx";
import { Dialog } from "./dialog.tsx";
import { Refusal } from "./refusal.tsx";

interface Props {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly title: string;
  readonly children: ReactNode;
  /** What the button does, as a verb: "Delete the notebook". */
  readonly action: string;
  readonly busy: boolean;
  readonly problem: string | null;
  readonly onConfirm: () => void;
}

/** Asks before something that cannot be taken back. The way out comes first and has the focus. */
export function ConfirmDialog({ open, onClose, title, children, action, busy, problem, onConfirm }: Props) {
  return (
    <Dialog open={open} onClose={onClose} title={title} description={children}>
      <Refusal sentence={problem} />
      <div className="mt-6 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Keep it as it is</Button>
        <Button look="danger" busy={busy} onClick={onConfirm}>
          {action}
        </Button>
      </div>
    </Dialog>
  );
}
