/** The editor of one formula: its source, drawn as one types; what is wrong, in words. */
import type { Editor } from "@tiptap/core";
import { Popover } from "radix-ui";
import { useId, useRef, useState, type KeyboardEvent } from "react";
import { classes } from "../../ui/classes.ts";
import { latexFaultWords } from "../../ui/latex-fault-words.ts";
import { Formula } from "../../ui/math.tsx";
import type { MathEditing, Opening } from "./math-editing.ts";
import { placeFormula, writeFormula } from "./formula-changes.ts";
import { premisesSymbols } from "./premises-symbols.ts";
import { SymbolList, useSymbolCompletion } from "./symbol-completion.tsx";
import { useSteadyAnchor } from "./use-steady-anchor.ts";
import { useCheckedSource } from "./use-checked-source.ts";

export interface FormulaEditorProps {
  readonly editor: Editor;
  readonly editing: MathEditing;
  readonly opening: Opening;
}

export function FormulaEditor({ editor, editing, opening }: FormulaEditorProps) {
  const { formula, isNew } = opening;
  const [before] = useState(() => formula.latex());
  const [source, setSource] = useState(before);
  const [label, setLabel] = useState(() => formula.label());
  const checked = useCheckedSource(trimDollars(source), formula.display);
  const [warning, setWarning] = useState<"replaced" | "removed" | null>(null);
  const anchor = useSteadyAnchor(formula.element);
  const field = useRef<HTMLTextAreaElement>(null);
  // Of the premises, offered before the others.
  const [ownNow] = useState(() => premisesSymbols(editor.state.doc));
  const completion = useSymbolCompletion({ source, setSource, field, ownSymbols: ownNow });
  const names = { source: useId(), fault: useId(), label: useId() };

  function leave(latex: string | null, side: "before" | "after" = "after") {
    const position = formula.position();
    editing.close();
    const attributes = { latex: latex ?? "", ...(formula.display ? { label } : {}) };
    if (position !== null) {
      if (latex !== null) writeFormula(editor, position, attributes, side);
      else if (isNew || before.trim() === "") writeFormula(editor, position, { latex: "" });
    } else if (latex !== null && latex !== "") {
      placeFormula(editor, formula.display, attributes);
    }
    editor.commands.focus();
  }

  function keep(side: "before" | "after" = "after") {
    // What a colleague did meanwhile is not undone without a word.
    const removed = formula.position() === null;
    const replaced = formula.latex() !== before && source !== formula.latex();
    if (warning === null && (removed || replaced)) setWarning(removed ? "removed" : "replaced");
    else leave(trimDollars(source), side);
  }

  function onKeyDown(event: KeyboardEvent<HTMLTextAreaElement>) {
    if (completion.onKeyDown(event)) return;
    const { selectionStart, selectionEnd, value } = event.currentTarget;
    const collapsed = selectionStart === selectionEnd;
    if (event.key === "Enter" && !event.shiftKey) {
      event.preventDefault();
      keep();
    } else if (event.key === "ArrowRight" && collapsed && selectionEnd === value.length) {
      event.preventDefault();
      keep("after");
    } else if (event.key === "ArrowLeft" && collapsed && selectionStart === 0) {
      event.preventDefault();
      keep("before");
    }
  }

  // A command that is still being typed is no mistake yet.
  const words =
    checked.fault && completion.found.length === 0 ? latexFaultWords(checked.fault, source) : null;
  return (
    <Popover.Root
      open
      onOpenChange={(open) => {
        if (!open) leave(null);
      }}
    >
      <Popover.Anchor virtualRef={anchor} />
      <Popover.Portal>
        <Popover.Content
          className="formula-editor"
          aria-label={formula.display ? "Displayed equation" : "Formula"}
          side="bottom"
          align="start"
          sideOffset={8}
          collisionPadding={12}
          onOpenAutoFocus={(event) => {
            event.preventDefault();
            field.current?.focus();
            field.current?.setSelectionRange(source.length, source.length);
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
          }}
          onInteractOutside={(event) => {
            event.preventDefault();
            keep();
          }}
          onEscapeKeyDown={(event) => {
            if (!completion.close()) return;
            event.preventDefault();
          }}
        >
          <div className={classes("formula-preview", checked.fault && "is-behind")}>
            {checked.good === "" ? (
              <span className="formula-hint">the formula appears here as you type</span>
            ) : (
              <Formula latex={checked.good} display={formula.display} />
            )}
          </div>
          <label className="formula-label" htmlFor={names.source}>
            LaTeX
          </label>
          <textarea
            id={names.source}
            ref={field}
            className="formula-source"
            value={source}
            rows={formula.display ? 3 : 1}
            spellCheck={false}
            autoCapitalize="off"
            autoComplete="off"
            aria-invalid={words !== null}
            aria-describedby={names.fault}
            {...completion.fieldProps}
            onChange={(event) => {
              setSource(event.target.value);
              completion.look(event.target.value, event.target.selectionStart);
            }}
            onSelect={(event) => {
              completion.look(event.currentTarget.value, event.currentTarget.selectionStart);
            }}
            onKeyDown={onKeyDown}
          />
          <SymbolList completion={completion} />
          <p id={names.fault} className="formula-fault" role="status">
            {words ? [words.sentence, words.place].filter(Boolean).join(" — ") : ""}
          </p>
          {warning !== null && (
            <p className="formula-fault" role="alert">
              {warning === "removed"
                ? "A colleague has removed this formula meanwhile. Enter again puts yours where the caret stands; Escape lets it go."
                : `A colleague has changed this formula to ${formula.latex()} meanwhile. Enter again replaces it with yours; Escape keeps theirs.`}
            </p>
          )}
          {formula.display && (
            <div className="formula-name">
              <label htmlFor={names.label}>name for references</label>
              <input
                id={names.label}
                value={label}
                spellCheck={false}
                onChange={(event) => {
                  setLabel(event.target.value);
                }}
                onKeyDown={(event) => {
                  if (event.key === "Enter") keep();
                }}
              />
            </div>
          )}
          <p className="formula-keys">
            <kbd>Enter</kbd> keeps, <kbd>Escape</kbd> gives up, <kbd>\</kbd> completes symbols
          </p>
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

/** Whoever types the closing dollars out of habit means them as the end. */
function trimDollars(source: string): string {
  return source
    .trim()
    .replace(/(?<!\\)\${1,2}$/, "")
    .replace(/^\${1,2}/, "")
    .trim();
}
