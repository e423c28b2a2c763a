import { lazy, Suspense, type ReactNode } from "react";

const DialogPanel = lazy(async () => ({ default: (await import("./dialog-panel.tsx")).DialogPanel }));

export interface DialogProps {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly title: string;
  /** Read aloud with the title. */
  readonly description?: ReactNode;
  readonly children?: ReactNode;
}

/** A question that holds the page until it is answered. Its code is fetched when the first one opens. */
export function Dialog(props: DialogProps) {
  if (!props.open) return null;
  return (
    <Suspense fallback={null}>
      <DialogPanel {...props} />
    </Suspense>
  );
}
