import type { ReactNode } from "react";

/** Why there is nothing here, and what to do about it. */
export function EmptyState({ title, children }: { readonly title: string; readonly children?: ReactNode }) {
  return (
    <div className="tick-rule mt-8 max-w-(--measure) pt-6">
      <p className="font-prose text-section leading-tight">{title}</p>
      {children && <div className="mt-3 space-y-3 text-body text-ink-2">{children}</div>}
    </div>
  );
}
