import type { NotebookRow } from "#contract/api.ts";
import { roleMay } from "#contract/roles.ts";
import { useState } from "react";
import { useNavigate } from "react-router-dom";
import {
  useChangeNotebook,
  useDeleteNotebook,
  useDuplicateNotebook,
  useRestoreNotebook,
} from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { Button } from "../../ui/button.tsx";
import { ConfirmDialog } from "../../ui/confirm-dialog.tsx";
import { Menu, type MenuItem } from "../../ui/menu.tsx";
import { say } from "../../ui/notices.ts";
import { RenameDialog } from "./rename-dialog.tsx";

/** What this person may do with a notebook from the shelf; only that is offered. */
export function NotebookActions({ notebook }: { readonly notebook: NotebookRow }) {
  return notebook.deletedAt === null ? (
    <ActionsOnShelf notebook={notebook} />
  ) : (
    <BringBack notebook={notebook} />
  );
}

/** What was deleted can be brought back, and nothing else. */
function BringBack({ notebook: { id, title } }: { readonly notebook: NotebookRow }) {
  const restore = useRestoreNotebook();
  return (
    <Button
      look="quiet"
      className="text-small"
      aria-label={`Bring back “${title}”`}
      busy={restore.isPending}
      onClick={() =>
        restore.mutate(id, {
          onSuccess: () => say(`“${title}” is back on the shelf, with the people it was shared with.`),
          onError: (error) => say(sentenceOf(error), "refused"),
        })
      }
    >
      Bring back
    </Button>
  );
}

function ActionsOnShelf({ notebook }: { readonly notebook: NotebookRow }) {
  const { id, title, role, archivedAt } = notebook;
  const [asking, setAsking] = useState<"rename" | "delete" | null>(null);
  const change = useChangeNotebook();
  const remove = useDeleteNotebook();
  const duplicate = useDuplicateNotebook();
  const navigate = useNavigate();
  const close = () => {
    setAsking(null);
  };
  const setArchived = (archived: boolean) => {
    change.mutate(
      { id, change: { archived } },
      {
        onSuccess: () => {
          say(
            archived
              ? `“${title}” is archived: it can be read, not changed.`
              : `“${title}” is back on the shelf.`,
          );
        },
        onError: (error) => {
          say(sentenceOf(error), "refused");
        },
      },
    );
  };

  const items: MenuItem[] = [{ name: "Sharing", onSelect: () => void navigate(`/notebooks/${id}/sharing`) }];
  items.push({
    name: "Duplicate",
    onSelect: () => {
      duplicate.mutate(id, {
        onSuccess: (copy) => say(`“${copy.title}” is on your shelf, shared with nobody.`),
        onError: (error) => say(sentenceOf(error), "refused"),
      });
    },
  });
  if (roleMay(role, "notebook.rename") && !archivedAt) {
    items.push({
      name: "Rename",
      onSelect: () => {
        setAsking("rename");
      },
    });
  }
  if (roleMay(role, "notebook.archive")) {
    items.push({
      name: archivedAt ? "Restore" : "Archive",
      onSelect: () => {
        setArchived(!archivedAt);
      },
    });
  }
  if (roleMay(role, "notebook.delete")) {
    items.push({
      name: "Delete",
      tone: "danger",
      onSelect: () => {
        setAsking("delete");
      },
    });
  }

  return (
    <>
      <Menu label={`Actions for “${title}”`} items={items} className="text-small">
        Actions
      </Menu>
      <RenameDialog open={asking === "rename"} onClose={close} id={id} title={title} />
      <ConfirmDialog
        open={asking === "delete"}
        onClose={close}
        title={`Delete “${title}”?`}
        action="Delete the notebook"
        busy={remove.isPending}
        problem={remove.isError ? sentenceOf(remove.error) : null}
        onConfirm={() => {
          remove.mutate(id, {
            onSuccess: () => {
              say(`“${title}” is deleted. For 30 days it can be brought back: show “Deleted” on the shelf.`);
              close();
            },
          });
        }}
      >
        <p>
          It disappears for everyone it is shared with (
          {notebook.people.length === 1 ? "only you" : `${notebook.people.length} people`}), and its referee
          links stop working. You can bring it back for 30 days; then it goes for good. To keep it readable,
          archive it instead.
        </p>
      </ConfirmDialog>
    </>
  );
}
