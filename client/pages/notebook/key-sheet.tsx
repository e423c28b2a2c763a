import { Dialog } from "../../ui/dialog.tsx";
import { INDEX_SHORTCUT } from "../../editor/editor-extensions.ts";
import { PIN_SHORTCUT } from "../../editor/pins/open-pin-picker.ts";

interface Group {
  readonly title: string;
  readonly keys: readonly (readonly [keys: string, what: string])[];
}

const groups: readonly Group[] = [
  {
    title: "Writing",
    keys: [
      ["$ … $", "a formula in the sentence"],
      ["$$", "a displayed, numbered equation"],
      ["\\", "inside mathematics: complete a symbol"],
      ["Mod B, Mod I, Mod E", "bold, italic, code"],
      ["Mod K", "a link"],
      ["# , ## , ###", "at the start of a line: a heading"],
      ["- , 1. , >", "at the start of a line: a list, a numbered list, a quotation"],
      ["Mod Z, Mod Shift Z", "undo and redo one's own changes"],
    ],
  },
  {
    title: "Placing",
    keys: [
      [INDEX_SHORTCUT.replace("-", " "), "the index of blocks and all else that can be placed"],
      [PIN_SHORTCUT.replaceAll("-", " "), "a number of a block, pinned into the sentence"],
      ["Mod ;", "find in the notebook"],
    ],
  },
  {
    title: "Blocks",
    keys: [
      ["arrows", "select a block from the text around it"],
      ["Enter", "on a selected block: go inside; in a table: down, and a new row at the end"],
      ["Escape", "from an entry back to the block, from there to the text"],
      ["Alt ↑, Alt ↓", "move a selected block, or a row of a table"],
      ["Delete", "delete a selected block"],
      ["arrows", "in a table of results: from figure to figure"],
    ],
  },
];

/** Every key of the notebook page. */
export function KeySheet({ onClose }: { readonly onClose: () => void }) {
  return (
    <Dialog open onClose={onClose} title="Keys">
      {groups.map(({ title, keys }) => (
        <section key={title} className="mt-5">
          <h3 className="engraved text-small text-ink-2">{title}</h3>
          <dl className="mt-2 grid grid-cols-[max-content_1fr] gap-x-6 gap-y-1 text-small">
            {keys.map(([pressed, what]) => (
              <div key={what} className="contents">
                <dt className="font-notation">{sayKeys(pressed)}</dt>
                <dd>{what}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
    </Dialog>
  );
}

function sayKeys(keys: string): string {
  const apple = /Mac|iPhone|iPad/.test(navigator.userAgent);
  return apple
    ? keys.replaceAll("Mod", "⌘").replaceAll("Shift", "⇧").replaceAll("Alt", "⌥")
    : keys.replaceAll("Mod", "Ctrl");
}
