/** A small panel beside what it belongs to. Escape and a press elsewhere close it. */
import { Popover } from "radix-ui";
import type { ReactNode, RefObject } from "react";

interface Props {
  /** What it stands beside: the button that opened it, or anything with a box. */
  readonly anchor: RefObject<{ getBoundingClientRect(): DOMRect } | null>;
  readonly label: string;
  readonly className: string;
  readonly sideOffset: number;
  readonly onClose: () => void;
  /** Where the focus goes then; never back to the button by itself. */
  readonly onCloseFocus: () => void;
  readonly children: ReactNode;
}

export function PopoverPanel(props: Props) {
  const { anchor, label, className, sideOffset, onClose, onCloseFocus, children } = props;
  // Radix wants an anchor that is there; ours is, since a panel is opened from it.
  const box = anchor as RefObject<{ getBoundingClientRect(): DOMRect }>;
  return (
    <Popover.Root
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
    >
      <Popover.Anchor virtualRef={box} />
      <Popover.Portal>
        <Popover.Content
          className={className}
          aria-label={label}
          side="bottom"
          align="start"
          sideOffset={sideOffset}
          collisionPadding={12}
          onInteractOutside={(event) => {
            // A press on the button that opened the panel closes it by itself.
            const { target } = event.detail.originalEvent;
            const button = anchor.current;
            if (button instanceof Element && target instanceof Node && button.contains(target))
              event.preventDefault();
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault();
            onCloseFocus();
          }}
        >
          {children}
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}
