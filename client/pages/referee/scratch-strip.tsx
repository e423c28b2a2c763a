import { useEffect, useRef, useState, useSyncExternalStore } from "react";
import { useOpenedSession } from "../../editor/notebook-context.ts";
import { Button } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { Strip, ToCheckSheet } from "./reading-strip.tsx";

/** Says that nothing typed here is sent or kept, and leads back; asks first only when something was changed. */
export function ScratchStrip({ onDiscard }: { readonly onDiscard: () => void }) {
  const [asking, setAsking] = useState(false);
  const changed = useHasChanged();
  const words = useRef<HTMLParagraphElement>(null);
  useEffect(() => {
    words.current?.focus();
  }, []);
  return (
    <Strip label="Scratch copy">
      <p ref={words} tabIndex={-1} className="referee-words">
        <strong>A scratch copy, yours alone.</strong> Change any input: the numbers in the text show what it
        does. Nothing you change here is sent or kept. The copy ends with this page and does not follow the
        notebook.
      </p>
      <p className="referee-tools">
        <ToCheckSheet />
        <Button
          onClick={() => {
            if (changed) setAsking(true);
            else onDiscard();
          }}
        >
          Discard the scratch copy
        </Button>
      </p>
      <ConfirmDialog
        open={asking}
        onClose={() => setAsking(false)}
        title="Discard the scratch copy?"
        action="Discard the copy"
        busy={false}
        problem={null}
        onConfirm={onDiscard}
      >
        What you changed in it is lost. The notebook itself was never touched.
      </ConfirmDialog>
    </Strip>
  );
}

const never = () => () => undefined;

/** Whether there is anything to take back: the copy's own history knows. */
function useHasChanged(): boolean {
  const history = useOpenedSession()?.history;
  return useSyncExternalStore(history?.subscribe ?? never, () => history?.state().canUndo ?? false);
}
