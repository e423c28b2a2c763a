import { useCallback, useEffect, useState } from "react";
import type { ShelfView } from "../../api/notebooks.ts";
import { Choice, SelectField, TextField } from "../../ui/field.tsx";

interface Props {
  readonly view: ShelfView;
  readonly onChange: (change: Partial<ShelfView>) => void;
}

const PAUSE_MS = 250;

export function ShelfControls({ view, onChange }: Props) {
  return (
    <div
      role="search"
      aria-label="Shelf"
      className="mt-6 grid grid-cols-2 items-end gap-x-5 gap-y-3 sm:flex sm:flex-wrap"
    >
      <SearchField view={view} onChange={onChange} />
      <SelectField
        label="Show"
        className="sm:w-36"
        value={view.show}
        options={[
          ["current", "Current"],
          ["archived", "Archived"],
          ["deleted", "Deleted"],
        ]}
        onValue={(show) => {
          onChange({ show });
        }}
      />
      <SelectField
        label="Sort by"
        className="sm:w-36"
        value={view.sort}
        options={[
          ["changed", "Last change"],
          ["title", "Title"],
        ]}
        onValue={(sort) => {
          onChange({ sort });
        }}
      />
      <div className="col-span-2 sm:pb-1.5">
        <Choice
          type="checkbox"
          label="Only with pins to look at"
          checked={view.attention === "moved"}
          onChecked={(checked) => {
            onChange({ attention: checked ? "moved" : "any" });
          }}
        />
      </div>
    </div>
  );
}

/** What is typed is searched for after a pause, or at once with Enter. */
function SearchField({ view, onChange }: Props) {
  const [typed, setTyped] = useState(view.search);
  // What this field last put into the address, and what it last found there: a difference came from elsewhere
  // (the browser's way back, a cleared search) and replaces what is typed.
  const [sent, setSent] = useState(view.search);
  const [found, setFound] = useState(view.search);
  if (view.search !== found) {
    setFound(view.search);
    if (view.search !== sent) {
      setSent(view.search);
      setTyped(view.search);
    }
  }
  const search = useCallback(
    (wanted: string) => {
      setSent(wanted);
      onChange({ search: wanted });
    },
    [onChange],
  );
  useEffect(() => {
    const wanted = typed.trim();
    if (wanted === sent) return;
    const timer = setTimeout(() => {
      search(wanted);
    }, PAUSE_MS);
    return () => {
      clearTimeout(timer);
    };
  }, [typed, sent, search]);
  return (
    <TextField
      label="Search titles, people and texts"
      type="search"
      maxLength={200}
      className="col-span-2 sm:min-w-64 sm:flex-1"
      value={typed}
      onValue={setTyped}
      onKeyDown={(event) => {
        if (event.key === "Enter") search(typed.trim());
      }}
    />
  );
}
