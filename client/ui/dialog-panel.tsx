import { Dialog } from "radix-ui";
import { useState } from "react";
import type { DialogProps } from "./dialog.tsx";

export function DialogPanel({ onClose, title, description, children }: DialogProps) {
  // Opened by state and not by a trigger of its own, so it remembers where the focus came from.
  const [opener] = useState(() => document.activeElement);
  return (
    <Dialog.Root
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
    >
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-veil" />
        <Dialog.Content
          className="fixed left-1/2 top-[12vh] z-50 max-h-[80vh] w-[min(34rem,calc(100vw-2rem))] -translate-x-1/2 overflow-y-auto border border-tick bg-paper px-6 pb-6 outline-none"
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            returnFocus(opener);
          }}
          {...(description ? {} : { "aria-describedby": undefined })}
        >
          <div className="tick-rule -mx-6 border-t-ink px-6 pt-6">
            <Dialog.Title className="text-lead font-semibold engraved">{title}</Dialog.Title>
          </div>
          {description && (
            <Dialog.Description asChild>
              <div className="mt-2 space-y-2 text-body text-ink-2">{description}</div>
            </Dialog.Description>
          )}
          {children}
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  );
}

/** To where it came from, or to the page's top when that has gone with what was deleted. */
function returnFocus(opener: Element | null): void {
  const goal = opener instanceof HTMLElement && opener.isConnected ? opener : document.getElementById("main");
  goal?.focus();
}
