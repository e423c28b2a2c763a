import { useId, useState } from "react";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import { nodesOf, readFileText } from "../../editor/files/blocks-file.ts";
import { newId } from "../../editor/new-id.ts";
import type { NotebookTools } from "../../editor/notebook-tools.ts";
import { Button } from "../../ui/button.tsx";
import { Dialog } from "../../ui/dialog.tsx";
import { say } from "../../ui/notices.ts";

interface Props extends NotebookTools {
  readonly onClose: () => void;
}
/** A file of 500 blocks with long tables stays well below this. */
const LARGEST_BYTES = 5_000_000;

/** Reads a file of blocks, shows what is in it, and puts it at the end of the notebook as one step of the history. */
export function OpenFile({ editor, onClose }: Props) {
  const [blocks, setBlocks] = useState<readonly BlockInstance[] | null>(null);
  const [faults, setFaults] = useState<readonly string[]>([]);
  const id = useId();

  async function choose(file: File | undefined) {
    setBlocks(null);
    setFaults([]);
    if (!file) return;
    if (file.size > LARGEST_BYTES) return setFaults(["The file is larger than 5 MB."]);
    const reading = readFileText(await file.text());
    if (reading.ok) setBlocks(reading.blocks);
    else setFaults(reading.sentences);
  }
  function place() {
    if (!blocks) return;
    editor.commands.startNewStep();
    const first = editor.state.doc.content.size;
    editor.commands.insertContentAt(first, [...nodesOf(blocks, newId), { type: "paragraph" }]);
    onClose();
    say(
      blocks.length === 1
        ? "One block was added at the end."
        : `${blocks.length} blocks were added at the end.`,
    );
    const element = editor.view.nodeDOM(first);
    if (element instanceof HTMLElement) element.scrollIntoView({ block: "center" });
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title="Open a file of blocks"
      description="A file as the command evaluate reads it. Its blocks go to the end of this notebook."
    >
      <label htmlFor={id} className="mt-4 block text-small text-ink-2">
        File
      </label>
      <input
        id={id}
        type="file"
        accept="application/json,.json"
        className="mt-1 block w-full text-small"
        onChange={(event) => void choose(event.target.files?.[0])}
      />
      <div role="status" className="mt-4 text-small">
        {blocks && (
          <p>
            {blocks.length === 1 ? "One block" : `${blocks.length} blocks`}:{" "}
            {blocks
              .map(({ kind, title }) => (title === "" ? kindDescriptions[kind].title : title))
              .join(", ")}
            .
          </p>
        )}
        {faults.length > 0 && (
          <>
            <p>Nothing was opened:</p>
            <ul className="mt-1 list-disc pl-5">
              {faults.map((fault) => (
                <li key={fault}>{fault}</li>
              ))}
            </ul>
          </>
        )}
      </div>
      <div className="mt-6 flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Leave it</Button>
        <Button look="main" disabled={!blocks} onClick={place}>
          Add to the notebook
        </Button>
      </div>
    </Dialog>
  );
}
