import type { StoredResult } from "#contract/api.ts";
import type { Editor } from "@tiptap/core";
import { lazy, Suspense, useEffect, useState, useSyncExternalStore, type ReactNode } from "react";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { say } from "../../ui/notices.ts";
import "../../blocks/blocks.css";
import { ResultsContext, useEvaluatorState } from "../evaluation/use-results.ts";
import type { NotebookSession } from "../notebook-session.ts";
import { announceTools } from "../notebook-tools.ts";
import { offerPinPicker } from "../pins/open-pin-picker.ts";
import { announcePins } from "../pins/use-pin-counts.ts";
import { BlockWorldContext, createBlockWorld, useBlockWorld, type BlockWorld } from "./block-world.ts";

interface Props {
  readonly session: NotebookSession;
  /** What the server has stored, for the first paint and for "moved by whom"; undefined while it is on its way. */
  readonly stored: readonly StoredResult[] | undefined;
  readonly children: ReactNode;
}

/** Around the editor: the blocks of the notebook, their results and who is in them. */
export function BlocksProvider({ session, stored, children }: Props) {
  const [world, setWorld] = useState<BlockWorld | null>(null);
  useEffect(() => {
    const opened = createBlockWorld(session);
    // The world follows Y and owns a worker: an outside system, made and ended with this effect.
    // eslint-disable-next-line react-hooks/set-state-in-effect -- see above
    setWorld(opened);
    return () => {
      setWorld(null);
      opened.destroy();
    };
  }, [session]);
  useEffect(() => {
    if (world && stored) world.results.setStored(stored);
  }, [world, stored]);
  if (!world) return null;
  return (
    <BlockWorldContext value={world}>
      <ResultsContext value={world.results}>
        {children}
        <Stopping />
        <Asking world={world} />
        <Picking world={world} />
      </ResultsContext>
    </BlockWorldContext>
  );
}

/** Tells the blocks which editor shows them. Called once by the editor's component. */
export function useBlocksEditor(editor: Editor): void {
  const world = useBlockWorld();
  useEffect(() => {
    world.showIn(editor);
    announceTools({ editor, world });
    const quiet = announcePins(world, editor);
    const withdraw = offerPinPicker(editor, () => world.pick(!world.session.state().readOnly));
    return () => {
      quiet();
      withdraw();
      announceTools(null);
      world.showIn(null);
    };
  }, [world, editor]);
}

const PinPicker = lazy(async () => ({ default: (await import("../pins/pin-picker.tsx")).PinPicker }));

function Picking({ world }: { readonly world: BlockWorld }) {
  const picking = useSyncExternalStore(world.onQuestion, world.picking);
  if (!picking) return null;
  return (
    <Suspense fallback={null}>
      <PinPicker onClose={() => world.pick(false)} />
    </Suspense>
  );
}

/** Says that computing has been stopped, and what to do about it. */
function Stopping() {
  const evaluator = useEvaluatorState();
  useEffect(() => {
    if (evaluator.state === "timed-out") {
      say(
        `Computing took longer than ${evaluator.seconds} seconds and was stopped. It starts again with the next change of a block.`,
        "refused",
      );
    } else if (evaluator.state === "crashed") {
      say(
        "Computing failed several times and was stopped. It starts again with the next change of a block.",
        "refused",
      );
    }
  }, [evaluator]);
  return null;
}

function Asking({ world }: { readonly world: BlockWorld }) {
  const question = useSyncExternalStore(world.onQuestion, world.question);
  if (!question) return null;
  return (
    <ConfirmDialog
      open
      title={question.title}
      action={question.yes}
      busy={false}
      problem={null}
      onClose={() => world.ask(null)}
      onConfirm={() => {
        world.ask(null);
        question.act();
      }}
    >
      {question.sentence}
    </ConfirmDialog>
  );
}
