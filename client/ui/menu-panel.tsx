import { DropdownMenu } from "radix-ui";
import type { RefObject } from "react";
import { classes } from "./classes.ts";
import type { MenuItem } from "./menu.tsx";

interface Props {
  readonly label: string;
  readonly items: readonly MenuItem[];
  readonly button: RefObject<HTMLButtonElement | null>;
  readonly onClose: () => void;
}

export function MenuPanel({ label, items, button, onClose }: Props) {
  return (
    <DropdownMenu.Root
      open
      modal={false}
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
    >
      {/* The button stands outside and is there before this code is; this only marks its place. */}
      <DropdownMenu.Trigger asChild>
        <span aria-hidden="true" tabIndex={-1} className="pointer-events-none absolute inset-0" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          aria-label={label}
          align="end"
          sideOffset={4}
          collisionPadding={8}
          loop
          className="z-50 min-w-44 border border-tick border-t-ink bg-paper py-1 outline-none"
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            // Unless what was chosen has taken the focus, a dialog for one.
            if (document.activeElement === document.body) button.current?.focus();
          }}
          onPointerDownOutside={(event) => {
            // A press on the button closes by its own click; closing here as well would open it again.
            if (event.target instanceof Node && button.current?.contains(event.target))
              event.preventDefault();
          }}
        >
          {items.map((item) => (
            <DropdownMenu.Item
              key={item.name}
              onSelect={() => {
                // First back to the button: a dialog that opens now returns the focus there.
                button.current?.focus();
                item.onSelect();
              }}
              className={classes(
                "flex min-h-9 cursor-pointer items-center px-4 text-body outline-none",
                "data-highlighted:bg-highlight data-highlighted:shadow-[inset_2px_0_0_var(--ink)]",
                item.tone === "danger" ? "text-hairline" : "text-ink",
              )}
            >
              {item.name}
            </DropdownMenu.Item>
          ))}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
