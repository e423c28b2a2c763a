import type { ShelfView } from "../../api/notebooks.ts";
import { templateWords } from "#contract/templates.ts";
import { useNavigate } from "react-router-dom";
import { useCreateNotebook } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { say } from "../../ui/notices.ts";
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
        Begin with a copy of a demonstration, which is a complete argument and shows what the blocks do, or
        with a blank page. Notebooks that others share with you will stand here too.
      </p>
      <ul className="mt-4 space-y-4">
        {demonstrations.map((template) => (
          <Demonstration key={template} template={template} />
        ))}
      </ul>
      <Button className="mt-6" onClick={onNew}>
        New notebook
      </Button>
    </EmptyState>
  );
}

const demonstrations = ["lantern", "tern"] as const;

/** One press makes a copy of one's own and opens it. */
function Demonstration({ template }: { readonly template: (typeof demonstrations)[number] }) {
  const create = useCreateNotebook();
  const navigate = useNavigate();
  const { label, hint } = templateWords[template];
  return (
    <li>
      <Button
        busy={create.isPending}
        busyLabel="Copying"
        onClick={() =>
          create.mutate(
            { template, title: label.replace("A copy of the", "The") },
            {
              onSuccess: ({ id }) => void navigate(`/notebooks/${id}`),
              onError: (error) => say(sentenceOf(error), "refused"),
            },
          )
        }
      >
        {label}
      </Button>
      <p className="mt-1 max-w-xl text-small text-ink-2">{hint}</p>
    </li>
  );
}
