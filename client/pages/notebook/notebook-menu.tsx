import type { Notebook } from "#contract/api.ts";
import type { BlockInstance } from "#engine/notebook/block-instance.ts";
import { lazy, Suspense, useEffect, useState } from "react";
import { useNavigate } from "react-router-dom";
import { useDuplicateNotebook } from "../../api/notebooks.ts";
import { sentenceOf } from "../../api/problem.ts";
import { useNotebookTools } from "../../editor/notebook-tools.ts";
import { Menu, type MenuItem } from "../../ui/menu.tsx";
import { say } from "../../ui/notices.ts";

const FindStrip = lazy(async () => ({
  default: (await import("../../editor/finding/find-strip.tsx")).FindStrip,
}));
const KeySheet = lazy(async () => ({ default: (await import("./key-sheet.tsx")).KeySheet }));
const OpenFile = lazy(async () => ({ default: (await import("./open-file.tsx")).OpenFile }));

/** What one may do with a whole notebook. */
export function NotebookMenu({ notebook }: { readonly notebook: Notebook }) {
  const { id, title } = notebook;
  const tools = useNotebookTools();
  const [shown, setShown] = useState<"find" | "keys" | "file" | null>(null);
  const duplicate = useDuplicateNotebook();
  const navigate = useNavigate();
  const close = () => setShown(null);
  useFindKey(() => setShown("find"));

  const items: MenuItem[] = [
    { name: "Find in the notebook", onSelect: () => setShown("find") },
    {
      name: "Duplicate",
      onSelect: () => {
        duplicate.mutate(id, {
          onSuccess: (copy) => {
            say(`“${copy.title}” is yours alone.`);
            void navigate(`/notebooks/${copy.id}`);
          },
          onError: (error) => say(sentenceOf(error), "refused"),
        });
      },
    },
    {
      name: "Download the blocks",
      onSelect: () => {
        if (tools) void downloadBlocks(tools.world.directory.blocks(), title);
      },
    },
    ...(tools?.editor.isEditable
      ? [{ name: "Open a file of blocks", onSelect: () => setShown("file") }]
      : []),
    { name: "Keys", onSelect: () => setShown("keys") },
  ];
  return (
    <>
      <Menu label="Actions for this notebook" items={items} className="text-small">
        Actions
      </Menu>
      <Suspense fallback={null}>
        {shown === "find" && tools && <FindStrip {...tools} onClose={close} />}
        {shown === "keys" && <KeySheet onClose={close} />}
        {shown === "file" && tools && <OpenFile {...tools} onClose={close} />}
      </Suspense>
    </>
  );
}

async function downloadBlocks(blocks: readonly BlockInstance[], title: string): Promise<void> {
  if (blocks.length === 0) return say("There are no blocks to download yet.", "refused");
  const { fileOf } = await import("../../editor/files/blocks-file.ts");
  const { download } = await import("../../ui/download.ts");
  download(`${title} blocks.json`, "application/json", `${JSON.stringify(fileOf(blocks), null, 2)}\n`);
}

/** Opens the search from anywhere in the notebook; the browser's own search stays on its key. */
function useFindKey(open: () => void): void {
  useEffect(() => {
    const hear = (event: KeyboardEvent) => {
      if (event.key !== ";" || !(event.ctrlKey || event.metaKey) || event.altKey) return;
      event.preventDefault();
      open();
    };
    window.addEventListener("keydown", hear);
    return () => window.removeEventListener("keydown", hear);
  });
}
