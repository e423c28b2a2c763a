/** The index of what can be placed: a search field over a list, moved in by the arrow keys. */
import { Fragment, useId, useLayoutEffect, useRef, useState, type KeyboardEvent } from "react";
import { classes } from "../../ui/classes.ts";
import { findPlaceables, type Placeable } from "./placeable.ts";

export function PlacementIndex({ onChoose }: { readonly onChoose: (placeable: Placeable) => void }) {
  const [typed, setTyped] = useState("");
  const [active, setActive] = useState(0);
  const listId = useId();
  const list = useRef<HTMLDivElement>(null);
  const found = findPlaceables(typed);
  const searching = typed.trim() !== "";
  const at = Math.min(active, found.length - 1);
  useLayoutEffect(() => {
    list.current?.querySelector('[aria-selected="true"]')?.scrollIntoView({ block: "nearest" });
  }, [at, typed]);

  function onKeyDown(event: KeyboardEvent) {
    const steps: Readonly<Record<string, number>> = { ArrowDown: 1, ArrowUp: -1, PageDown: 5, PageUp: -5 };
    const step = steps[event.key];
    if (step !== undefined && found.length > 0) {
      const wrapped = Math.abs(step) === 1 ? (at + step + found.length) % found.length : at + step;
      setActive(Math.max(0, Math.min(found.length - 1, wrapped)));
    } else if (event.key === "Enter") {
      const chosen = found[at];
      if (chosen) onChoose(chosen);
    } else {
      return;
    }
    event.preventDefault();
  }

  return (
    <>
      <input
        className="placement-search"
        type="text"
        role="combobox"
        aria-label="Search what can be placed"
        aria-expanded="true"
        aria-controls={listId}
        aria-autocomplete="list"
        aria-activedescendant={found[at] ? `${listId}-${found[at].id}` : undefined}
        placeholder="premises, equation, table…"
        value={typed}
        spellCheck={false}
        autoComplete="off"
        onChange={(event) => {
          setTyped(event.target.value);
          setActive(0);
        }}
        onKeyDown={onKeyDown}
      />
      <div id={listId} ref={list} role="listbox" aria-label="What can be placed" className="placement-list">
        {found.map((placeable, index) => (
          <Fragment key={placeable.id}>
            {!searching && placeable.group !== found[index - 1]?.group && (
              <div className="placement-group engraved" role="presentation">
                {placeable.group}
              </div>
            )}
            {/* The keyboard reaches these through the search field (aria-activedescendant). */}
            <div
              id={`${listId}-${placeable.id}`}
              role="option"
              aria-selected={index === at}
              tabIndex={-1}
              className={classes("placement-entry", index === at && "is-active")}
              onPointerMove={() => {
                setActive(index);
              }}
              onClick={() => {
                onChoose(placeable);
              }}
              onKeyDown={onKeyDown}
            >
              <span className="placement-title">{placeable.title}</span>
              <span className="placement-purpose">{placeable.purpose}</span>
            </div>
          </Fragment>
        ))}
      </div>
      {found.length === 0 && (
        <p className="placement-none" role="status">
          Nothing by that name.
        </p>
      )}
    </>
  );
}
