/** The address of a link: a small popover beside the bar, also by Mod-K. */
import type { Editor } from "@tiptap/core";
import { useEditorState } from "@tiptap/react";
import { Popover, Toolbar } from "radix-ui";
import { useEffect, useId, useState } from "react";
import { isSafeLink } from "#schema/safe-link.ts";
import { Button } from "../../ui/button.tsx";

export function LinkEditor({ editor }: { readonly editor: Editor }) {
  const [open, setOpen] = useState(false);
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
    <Popover.Root open={open} onOpenChange={setOpen}>
      <Popover.Trigger asChild>
        <Toolbar.Button
          className="bar-mark underline"
          aria-label="Link"
          aria-pressed={active}
          title="Link (Ctrl K)"
          data-sign="link"
        />
      </Popover.Trigger>
      <Popover.Portal>
        <Popover.Content
          className="link-editor"
          aria-label="Link"
          align="start"
          sideOffset={6}
          collisionPadding={12}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            editor.commands.focus();
          }}
        >
          <LinkForm
            editor={editor}
            onDone={() => {
              setOpen(false);
            }}
          />
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function LinkForm({ editor, onDone }: { readonly editor: Editor; readonly onDone: () => void }) {
  const [before] = useState(() => {
    const address: unknown = editor.getAttributes("link")["href"];
    return typeof address === "string" ? address : "";
  });
  const [address, setAddress] = useState(before);
  const [refused, setRefused] = useState(false);
  const names = { address: useId(), fault: useId() };

  function keep() {
    const typed = address.trim();
    if (typed === "") {
      remove();
      return;
    }
    const whole = isSafeLink(typed) ? typed : `https://${typed}`;
    if (!isSafeLink(whole) || /^[a-z][a-z0-9+.-]*:(?!\d)/i.test(typed) !== isSafeLink(typed)) {
      setRefused(true);
      return;
    }
    const chain = editor.chain().extendMarkRange("link");
    if (editor.state.selection.empty && before === "") {
      chain
        .insertContent({ type: "text", text: typed, marks: [{ type: "link", attrs: { href: whole } }] })
        .run();
    } else {
      chain.setLink({ href: whole }).run();
    }
    onDone();
  }
  function remove() {
    editor.chain().extendMarkRange("link").unsetLink().run();
    onDone();
  }

  return (
    <form
      onSubmit={(event) => {
        event.preventDefault();
        keep();
      }}
    >
      <label htmlFor={names.address}>Address</label>
      <input
        id={names.address}
        type="text"
        inputMode="url"
        value={address}
        placeholder="https://…"
        spellCheck={false}
        aria-invalid={refused}
        aria-describedby={names.fault}
        onChange={(event) => {
          setAddress(event.target.value);
          setRefused(false);
        }}
      />
      <p id={names.fault} className="formula-fault" role="status">
        {refused ? "A link begins with https://, http:// or mailto:." : ""}
      </p>
      <div className="link-buttons">
        <Button type="submit" look="main">
          Keep link
        </Button>
        {before !== "" && <Button onClick={remove}>Remove link</Button>}
        {isSafeLink(before) && (
          <a className="link-open" href={before} target="_blank" rel="noopener noreferrer nofollow">
            Open
          </a>
        )}
      </div>
    </form>
  );
}
