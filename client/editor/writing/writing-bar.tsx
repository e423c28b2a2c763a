/** A slim bar over the prose: the form of what is selected. One tab stop; the arrow keys move within it. */
import type { ChainedCommands, Editor } from "@tiptap/core";
import { useEditorState } from "@tiptap/react";
import { Toolbar } from "radix-ui";
import { insertFormula } from "../mathematics/mathematics.ts";
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
    <Toolbar.Root className="writing-bar" aria-label="Form of the text">
      <TextKindChoice editor={editor} kind={now.kind} />
      <Mark
        name="Bold"
        keys="Mod B"
        pressed={now.bold}
        onPress={() => {
          run((chain) => chain.toggleBold());
        }}
      >
        <b>B</b>
      </Mark>
      <Mark
        name="Italic"
        keys="Mod I"
        pressed={now.italic}
        onPress={() => {
          run((chain) => chain.toggleItalic());
        }}
      >
        <i>I</i>
      </Mark>
      <Mark
        name="Code"
        keys="Mod E"
        pressed={now.code}
        onPress={() => {
          run((chain) => chain.toggleCode());
        }}
      >
        <span className="font-notation">c</span>
      </Mark>
      <LinkEditor editor={editor} />
      <Mark
        name="Formula"
        onPress={() => {
          insertFormula(editor, false);
        }}
      >
        <i>x</i>²
      </Mark>
      <Toolbar.Separator className="bar-rule" />
      <Mark
        name="List"
        keys="Mod Shift 8"
        pressed={now.bulletList}
        onPress={() => {
          run((chain) => chain.toggleBulletList());
        }}
      >
        list
      </Mark>
      <Mark
        name="Numbered list"
        keys="Mod Shift 7"
        pressed={now.orderedList}
        onPress={() => {
          run((chain) => chain.toggleOrderedList());
        }}
      >
        1. 2.
      </Mark>
      <Mark
        name="Quotation"
        keys="Mod Shift B"
        pressed={now.blockquote}
        onPress={() => {
          run((chain) => chain.toggleBlockquote());
        }}
      >
        “ ”
      </Mark>
      {now.table && <TableMarks run={run} />}
      <Toolbar.Separator className="bar-rule" />
      <Mark name="Undo my last change" keys="Mod Z" disabled={!history.canUndo} onPress={history.undo}>
        undo
      </Mark>
      <Mark name="Make my change again" keys="Mod Shift Z" disabled={!history.canRedo} onPress={history.redo}>
        redo
      </Mark>
    </Toolbar.Root>
  );
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
      <Toolbar.Separator className="bar-rule" />
      {marks.map(([name, words, change]) => (
        <Mark
          key={name}
          name={name}
          onPress={() => {
            run(change);
          }}
        >
          {words}
        </Mark>
      ))}
    </>
  );
}

interface MarkProps {
  readonly name: string;
  readonly keys?: string;
  readonly pressed?: boolean;
  readonly disabled?: boolean;
  readonly onPress: () => void;
  readonly children: React.ReactNode;
}

export function Mark({ name, keys, pressed, disabled = false, onPress, children }: MarkProps) {
  return (
    <Toolbar.Button
      className="bar-mark"
      aria-label={name}
      title={keys ? `${name} (${keyWords(keys)})` : name}
      aria-pressed={pressed}
      disabled={disabled}
      onPointerDown={(event) => {
        // The selection in the prose must survive the press.
        event.preventDefault();
      }}
      onClick={onPress}
    >
      {children}
    </Toolbar.Button>
  );
}

function keyWords(keys: string): string {
  const apple = /Mac|iPhone|iPad/.test(navigator.userAgent);
  return apple ? keys.replace("Mod ", "⌘").replace("Shift ", "⇧") : keys.replace("Mod", "Ctrl");
}
