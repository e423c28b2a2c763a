/** The address of the selected link, or of one to be. */
import type { Editor } from "@tiptap/core";
import { useId, useState, type RefObject } from "react";
import { isSafeLink } from "#schema/safe-link.ts";
import { Button } from "../../ui/button.tsx";
import { PopoverPanel } from "../../ui/popover-panel.tsx";

export interface LinkPanelProps {
  readonly editor: Editor;
  readonly button: RefObject<HTMLButtonElement | null>;
  readonly onClose: () => void;
}

export function LinkPanel({ editor, button, onClose }: LinkPanelProps) {
  return (
    <PopoverPanel
      anchor={button}
      className="link-editor"
      label="Link"
      sideOffset={6}
      onClose={onClose}
      onCloseFocus={() => {
        editor.commands.focus();
      }}
    >
      <LinkForm editor={editor} onDone={onClose} />
    </PopoverPanel>
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
