import { useId, useState } from "react";
import { useShelf } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { Loading } from "../../ui/loading.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { NewNotebookDialog } from "./new-notebook-dialog.tsx";
import { EmptyShelf } from "./empty-shelf.tsx";
import { ShelfControls } from "./shelf-controls.tsx";
import { ShelfTable } from "./shelf-table.tsx";
import { useShelfView } from "./shelf-view.ts";

/** Every notebook of a person, and the way to a new one. */
export function ShelfPage() {
  const [view, changeView] = useShelfView();
  const shelf = useShelf(view);
  const [asking, setAsking] = useState(false);
  const headingId = useId();
  const notebooks = shelf.data?.pages.flatMap((page) => page.notebooks) ?? [];
  const begin = () => {
    setAsking(true);
  };
  return (
    <PageFrame title="Shelf">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <h1 id={headingId} className="font-prose text-title leading-tight">
          Shelf
        </h1>
        <Button look="main" onClick={begin}>
          New notebook
        </Button>
      </div>
      <ShelfControls view={view} onChange={changeView} />
      <Refusal sentence={shelf.isError ? sentenceOf(shelf.error) : null} />
      {shelf.isError && (
        <Button className="mt-4" onClick={() => void shelf.refetch()}>
          Try again
        </Button>
      )}
      {shelf.isPending && <Loading what="Reading the shelf" />}
      {shelf.data && notebooks.length === 0 && <EmptyShelf view={view} onChange={changeView} onNew={begin} />}
      {notebooks.length > 0 && (
        <ShelfTable notebooks={notebooks} labelledBy={headingId} stale={shelf.isPlaceholderData} />
      )}
      <div role="status" className="mt-6 text-small text-ink-2">
        {shelf.data && notebooks.length > 0 && !shelf.hasNextPage && (
          <p>{notebooks.length === 1 ? "One notebook." : `${notebooks.length} notebooks.`}</p>
        )}
      </div>
      {shelf.hasNextPage && (
        <Button
          busy={shelf.isFetchingNextPage}
          busyLabel="Reading more"
          onClick={() => void shelf.fetchNextPage()}
        >
          Show more
        </Button>
      )}
      <NewNotebookDialog
        open={asking}
        onClose={() => {
          setAsking(false);
        }}
      />
    </PageFrame>
  );
}
