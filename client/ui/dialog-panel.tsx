import { Dialog } from "radix-ui";
import type { DialogProps } from "./dialog.tsx";

export function DialogPanel({ onClose, title, description, children }: DialogProps) {
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
