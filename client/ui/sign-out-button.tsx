import { useState } from "react";
import { useSignOut } from "../api/me.ts";
import { sentenceOf } from "../api/problem.ts";
import { Button } from "./button.tsx";
import { ConfirmDialog } from "./confirm-dialog.tsx";

/** Signing out drops the copies of notebooks on this device; typing that was never sent would go with them, so it asks. */
export function SignOutButton() {
  const [asking, setAsking] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const signOut = useSignOut();
  const leave = () => {
    signOut.mutate(undefined, {
      onError: (error) => {
        setProblem(sentenceOf(error));
        setAsking(true);
      },
    });
  };
  const ask = async () => {
    const { holdsUnsavedTyping } = await import("../editor/local-copy.ts");
    setProblem(null);
    if (holdsUnsavedTyping()) setAsking(true);
    else leave();
  };
  return (
    <>
      <Button look="quiet" className="text-small" busy={signOut.isPending} onClick={() => void ask()}>
        Sign out
      </Button>
      <ConfirmDialog
        open={asking}
        onClose={() => {
          setAsking(false);
        }}
        title="Sign out?"
        action="Sign out"
        busy={signOut.isPending}
        problem={problem}
        onConfirm={leave}
      >
        <p>
          Copies of your notebooks on this device are deleted. If something you typed has not reached the
          server yet, open that notebook first and wait for “all changes saved”.
        </p>
      </ConfirmDialog>
    </>
  );
}
