/** The list of symbols under a formula's source: opened by a backslash, moved in by the arrow keys. */
import { useId, useLayoutEffect, useRef, useState, type KeyboardEvent, type RefObject } from "react";
import { classes } from "../../ui/classes.ts";
import { Formula } from "../../ui/math.tsx";
import { commandAt, complete } from "./completion.ts";
import { findSymbols, latexSymbols, type LatexSymbol } from "./latex-symbols.ts";

interface CompletionOptions {
  readonly source: string;
  readonly setSource: (source: string) => void;
  readonly field: RefObject<HTMLTextAreaElement | null>;
  readonly ownSymbols: readonly LatexSymbol[];
}

export function useSymbolCompletion({ source, setSource, field, ownSymbols }: CompletionOptions) {
  const [open, setOpen] = useState<{ readonly typed: string; readonly active: number } | null>(null);
  const caretToBe = useRef<number | null>(null);
  const listId = useId();
  const found = open === null ? [] : findSymbols(open.typed, [...ownSymbols, ...latexSymbols]);
  const shown = found.length > 0 && !(found.length === 1 && found[0]?.insert === `\\${open?.typed ?? ""}`);
  const active = Math.min(open?.active ?? 0, found.length - 1);

  // React writes the new source first; only then can the caret be put inside it.
  useLayoutEffect(() => {
    if (caretToBe.current === null) return;
    field.current?.setSelectionRange(caretToBe.current, caretToBe.current);
    caretToBe.current = null;
  }, [source, field]);

  function look(value: string, caret: number) {
    const command = commandAt(value, caret);
    setOpen((before) => {
      if (!command) return null;
      return before?.typed === command.typed ? before : { typed: command.typed, active: 0 };
    });
  }

  function take(symbol: LatexSymbol) {
    const caret = field.current?.selectionStart ?? source.length;
    const done = complete(source, caret, symbol);
    caretToBe.current = done.caret;
    setSource(done.source);
    setOpen(null);
    field.current?.focus();
  }

  function onKeyDown(event: KeyboardEvent): boolean {
    if (!shown || open === null) return false;
    const { key } = event;
    const step = key === "ArrowDown" ? 1 : key === "ArrowUp" ? -1 : 0;
    const chosen = found[active];
    if (step !== 0) {
      setOpen({ ...open, active: (active + step + found.length) % found.length });
    } else if ((key === "Enter" || key === "Tab") && chosen) {
      // A name typed out whole is meant as it stands: Enter then keeps the formula.
      if (key === "Enter" && (chosen.name === open.typed || open.typed === "")) return false;
      take(chosen);
    } else {
      return false;
    }
    event.preventDefault();
    return true;
  }

  /** True when there was a list to close. */
  function close(): boolean {
    if (!shown) return false;
    setOpen(null);
    return true;
  }

  const fieldProps = {
    // A text area keeps its own role, which knows no "expanded"; the active option is announced all the same.
    "aria-autocomplete": "list",
    "aria-haspopup": "listbox",
    "aria-controls": listId,
    "aria-activedescendant": shown ? `${listId}-${String(active)}` : undefined,
  } as const;
  return { found: shown ? found : [], active, listId, fieldProps, look, take, onKeyDown, close };
}

export function SymbolList({ completion }: { readonly completion: ReturnType<typeof useSymbolCompletion> }) {
  const { found, active, listId, take } = completion;
  const list = useRef<HTMLUListElement>(null);
  useLayoutEffect(() => {
    list.current?.querySelector('[aria-selected="true"]')?.scrollIntoView({ block: "nearest" });
  }, [active, found.length]);
  return (
    <ul
      id={listId}
      ref={list}
      role="listbox"
      aria-label="Symbols"
      className="symbol-list"
      hidden={found.length === 0}
    >
      {found.map((symbol, index) => (
        // The keyboard reaches these through the field they belong to (aria-activedescendant).
        <li
          key={symbol.group + symbol.insert}
          id={`${listId}-${String(index)}`}
          role="option"
          tabIndex={-1}
          aria-selected={index === active}
          className={classes("symbol", index === active && "is-active")}
          onPointerDown={(event) => {
            event.preventDefault();
            take(symbol);
          }}
        >
          <span className="symbol-drawn" aria-hidden="true">
            <Formula latex={symbol.example} />
          </span>
          <span className="symbol-name">{symbol.insert.replace("▯", "")}</span>
          <span className="symbol-group">{symbol.group}</span>
        </li>
      ))}
    </ul>
  );
}
