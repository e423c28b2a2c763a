/** The bar's button for links, also by Mod-K; its panel's code is fetched when it first opens. */
import type { Editor } from "@tiptap/core";
import { useEditorState } from "@tiptap/react";
import { useEffect, useRef, useState } from "react";
import { fetched } from "../../ui/fetched.tsx";
import type { LinkPanelProps } from "./link-panel.tsx";

export const linkPanel = fetched<LinkPanelProps>(async () => (await import("./link-panel.tsx")).LinkPanel);

export function LinkEditor({ editor }: { readonly editor: Editor }) {
  const [open, setOpen] = useState(false);
  const button = useRef<HTMLButtonElement>(null);
  const close = () => {
    setOpen(false);
  };
  const active = useEditorState({ editor, selector: ({ editor: now }) => now.isActive("link") });
  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent) => {
      if (
        !(event.metaKey || event.ctrlKey) ||
        event.shiftKey ||
        event.altKey ||
        event.key.toLowerCase() !== "k"
      )
        return;
      event.preventDefault();
      setOpen(true);
    };
    const { dom } = editor.view;
    dom.addEventListener("keydown", onKeyDown);
    return () => {
      dom.removeEventListener("keydown", onKeyDown);
    };
  }, [editor]);

  return (
    <>
      <button
        ref={button}
        type="button"
        className="bar-mark underline"
        aria-label="Link"
        aria-pressed={active}
        aria-haspopup="dialog"
        aria-expanded={open}
        title="Link (Ctrl K)"
        data-sign="link"
        onClick={() => {
          setOpen(!open);
        }}
      />
      {open && <linkPanel.Part editor={editor} button={button} onClose={close} onMissing={close} />}
    </>
  );
}
