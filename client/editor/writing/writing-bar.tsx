/** A slim bar over the prose: the form of what is selected. One tab stop; the arrow keys move within it. */
import type { ChainedCommands, Editor } from "@tiptap/core";
import { useEditorState } from "@tiptap/react";
import { classes } from "../../ui/classes.ts";
import { Toolbar } from "../../ui/toolbar.tsx";
import { insertFormula } from "../mathematics/formula-changes.ts";
import { useHistory } from "../notebook-context.ts";
import { LinkEditor } from "./link-editor.tsx";
import { textKinds, type TextKind } from "./text-kind.ts";

export function WritingBar({ editor }: { readonly editor: Editor }) {
  const now = useEditorState({
    editor,
    selector: ({ editor: current }) => ({
      bold: current.isActive("bold"),
      italic: current.isActive("italic"),
      strike: current.isActive("strike"),
      code: current.isActive("code"),
      bulletList: current.isActive("bulletList"),
      orderedList: current.isActive("orderedList"),
      blockquote: current.isActive("blockquote"),
      table: current.isActive("table"),
      kind: textKinds.find((kind) => kind.isActive(current))?.id ?? "paragraph",
    }),
  });
  const history = useHistory();
  const run = (change: (chain: ChainedCommands) => ChainedCommands) => {
    change(editor.chain().focus()).run();
  };

  return (
    <Toolbar className="writing-bar" label="Form of the text">
      <TextKindChoice editor={editor} kind={now.kind} />
      <Mark
        name="Bold"
        sign="B"
        face="bar-bold"
        keys="Mod B"
        pressed={now.bold}
        onPress={() => run((chain) => chain.toggleBold())}
      />
      <Mark
        name="Italic"
        sign="I"
        face="bar-italic"
        keys="Mod I"
        pressed={now.italic}
        onPress={() => run((chain) => chain.toggleItalic())}
      />
      <Mark
        name="Code"
        sign="c"
        face="bar-code"
        keys="Mod E"
        pressed={now.code}
        onPress={() => run((chain) => chain.toggleCode())}
      />
      <LinkEditor editor={editor} />
      <Mark name="Formula" sign="x²" face="bar-italic" onPress={() => insertFormula(editor)} />
      <Rule />
      <Mark
        name="List"
        sign="list"
        keys="Mod Shift 8"
        pressed={now.bulletList}
        onPress={() => run((chain) => chain.toggleBulletList())}
      />
      <Mark
        name="Numbered list"
        sign="1. 2."
        keys="Mod Shift 7"
        pressed={now.orderedList}
        onPress={() => run((chain) => chain.toggleOrderedList())}
      />
      <Mark
        name="Quotation"
        sign="“ ”"
        keys="Mod Shift B"
        pressed={now.blockquote}
        onPress={() => run((chain) => chain.toggleBlockquote())}
      />
      {now.table && <TableMarks run={run} />}
      <Rule />
      <Mark
        name="Undo my last change"
        sign="undo"
        keys="Mod Z"
        disabled={!history.canUndo}
        onPress={history.undo}
      />
      <Mark
        name="Redo my change"
        sign="redo"
        keys="Mod Shift Z"
        disabled={!history.canRedo}
        onPress={history.redo}
      />
    </Toolbar>
  );
}

function Rule() {
  return <span className="bar-rule" role="separator" aria-orientation="vertical" />;
}

function TextKindChoice({ editor, kind }: { readonly editor: Editor; readonly kind: TextKind["id"] }) {
  return (
    <select
      className="bar-choice"
      aria-label="Kind of paragraph"
      value={kind}
      onChange={(event) => {
        textKinds.find(({ id }) => id === event.target.value)?.apply(editor);
      }}
    >
      {textKinds.map(({ id, title }) => (
        <option key={id} value={id}>
          {title}
        </option>
      ))}
    </select>
  );
}

function TableMarks({
  run,
}: {
  readonly run: (change: (chain: ChainedCommands) => ChainedCommands) => void;
}) {
  const marks: readonly (readonly [string, string, (chain: ChainedCommands) => ChainedCommands])[] = [
    ["Add a row below", "row +", (chain) => chain.addRowAfter()],
    ["Remove this row", "row −", (chain) => chain.deleteRow()],
    ["Add a column to the right", "column +", (chain) => chain.addColumnAfter()],
    ["Remove this column", "column −", (chain) => chain.deleteColumn()],
    ["Heading row on or off", "heading row", (chain) => chain.toggleHeaderRow()],
    ["Remove the table", "table −", (chain) => chain.deleteTable()],
  ];
  return (
    <>
      <Rule />
      {marks.map(([name, sign, change]) => (
        <Mark key={name} name={name} sign={sign} onPress={() => run(change)} />
      ))}
    </>
  );
}

interface MarkProps {
  readonly name: string;
  /** What is drawn; it is not read aloud. */
  readonly sign: string;
  readonly face?: string;
  readonly keys?: string;
  readonly pressed?: boolean;
  readonly disabled?: boolean;
  readonly onPress: () => void;
}

function Mark({ name, sign, face, keys, pressed, disabled = false, onPress }: MarkProps) {
  return (
    <button
      type="button"
      className={classes("bar-mark", face)}
      aria-label={name}
      title={keys ? `${name} (${keyWords(keys)})` : name}
      aria-pressed={pressed}
      data-sign={sign}
      disabled={disabled}
      onPointerDown={(event) => {
        // The selection in the prose must survive the press.
        event.preventDefault();
      }}
      onClick={onPress}
    />
  );
}

function keyWords(keys: string): string {
  const apple = /Mac|iPhone|iPad/.test(navigator.userAgent);
  return apple ? keys.replace("Mod ", "⌘").replace("Shift ", "⇧") : keys.replace("Mod", "Ctrl");
}
