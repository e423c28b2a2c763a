import type { ShelfView } from "../../api/notebooks.ts";
import { Button } from "../../ui/button.tsx";
import { EmptyState } from "../../ui/empty-state.tsx";
import { wholeShelf } from "./shelf-view.ts";

interface Props {
  readonly view: ShelfView;
  readonly onChange: (change: Partial<ShelfView>) => void;
  readonly onNew: () => void;
}

/** An empty table has a reason; each is said with its way on. */
export function EmptyShelf({ view, onChange, onNew }: Props) {
  if (view.search !== "") {
    return (
      <EmptyState title={`Nothing here matches “${view.search}”`}>
        <Button
          onClick={() => {
            onChange({ search: "", attention: wholeShelf.attention });
          }}
        >
          Clear the search
        </Button>
      </EmptyState>
    );
  }
  if (view.attention === "moved") {
    return (
      <EmptyState title="No pin asks for attention">
        <p>Every pinned number here agrees with the block it came from.</p>
        <Button
          onClick={() => {
            onChange({ attention: wholeShelf.attention });
          }}
        >
          Show every notebook
        </Button>
      </EmptyState>
    );
  }
  if (view.show === "deleted") {
    return (
      <EmptyState title="Nothing was deleted">
        <p>A notebook that you delete stands here for 30 days and can be brought back.</p>
      </EmptyState>
    );
  }
  if (view.show === "archived") {
    return (
      <EmptyState title="Nothing is archived">
        <p>An archived notebook stays readable and can be restored by its owner.</p>
      </EmptyState>
    );
  }
  return (
    <EmptyState title="The shelf is empty">
      <p>
        Begin with a blank notebook, or with a copy of the Lantern demonstration to see premises, counting and
        pins at work. Notebooks that others share with you will stand here too.
      </p>
      <Button onClick={onNew}>New notebook</Button>
    </EmptyState>
  );
}
