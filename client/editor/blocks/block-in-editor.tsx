import type { Editor } from "@tiptap/core";
import { useSyncExternalStore, type KeyboardEvent } from "react";
import type { BlockFrameProps } from "../../blocks/frame.tsx";
import { BlockHandleContext } from "../../blocks/block-handle.ts";
import { fetched } from "../../ui/fetched.tsx";
import { AwaitedBlock } from "./awaited-block.tsx";
import { blockPlaces, deleteBlock, moveBlock, selectBlock } from "./block-places.ts";
import { useBlockWorld } from "./block-world.ts";
import { useTurn } from "./drawing-turns.ts";
import { useBlockHandle } from "./use-block-handle.ts";

/** Forms, results and the words of their problems: fetched when a notebook has blocks, while its prose is read. */
export const blockFrame = fetched<BlockFrameProps>(
  async () => (await import("../../blocks/frame.tsx")).BlockFrame,
);

export interface BlockInEditorProps {
  readonly editor: Editor;
  /** The id the node carries; read apart when another block carries it too. */
  readonly ownId: string;
  readonly kind: string;
  readonly selected: boolean;
  readonly getPosition: () => number | undefined;
}

export function BlockInEditor(props: BlockInEditorProps) {
  const { directory } = useBlockWorld();
  const blockId = useSyncExternalStore(directory.subscribe, () => readAs(props));
  // The form's state belongs to one block; the editor may hand this view another one of the same kind.
  return <Block key={blockId} blockId={blockId} {...props} />;
}

/** Only doubled ids need a look at the document; `~` never occurs in an id we make. */
function readAs({ editor, ownId, getPosition }: BlockInEditorProps): string {
  const position = getPosition();
  if (ownId !== "" && !editor.isDestroyed && position !== undefined) {
    for (const [blockId, place] of blockPlaces(editor.state.doc)) {
      if (place.position === position) return blockId;
    }
  }
  return ownId;
}

function Block({
  blockId,
  editor,
  selected,
  getPosition,
}: BlockInEditorProps & { readonly blockId: string }) {
  const world = useBlockWorld();
  const handle = useBlockHandle(blockId);
  const due = useTurn(world.drawing, blockFrame.isReady, blockFrame.prepare);
  if (!handle) return null;

  function onKeyDown(event: KeyboardEvent) {
    const position = getPosition();
    if (event.key === "Escape" && !event.defaultPrevented && position !== undefined) {
      event.preventDefault();
      selectBlock(editor, position);
      return;
    }
    // In a list or on a button, undo is the notebook's too.
    if (!(event.ctrlKey || event.metaKey) || event.altKey || event.defaultPrevented) return;
    const key = event.key.toLowerCase();
    if (key !== "z" && key !== "y") return;
    event.preventDefault();
    if (key === "y" || event.shiftKey) handle?.redo();
    else handle?.undo();
  }

  return (
    <BlockHandleContext value={handle}>
      {due ? (
        <blockFrame.Part
          meanwhile={<AwaitedBlock />}
          selected={selected}
          onKeyDown={onKeyDown}
          onMove={(step) => moveBlock(world, editor, blockId, step)}
          onDelete={() => deleteBlock(world, editor, blockId)}
        />
      ) : (
        <AwaitedBlock />
      )}
    </BlockHandleContext>
  );
}
