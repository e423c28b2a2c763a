import type { ReactNode } from "react";

/** A family of parts under a ticked rule. */
export function Family({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section className="tick-rule mt-12 pt-6">
      <h2 className="engraved text-lead font-semibold">{title}</h2>
      <div className="mt-4 grid gap-6">{children}</div>
    </section>
  );
}

/** One part in one state, under its name. */
export function Specimen({ name, children }: { readonly name: string; readonly children: ReactNode }) {
  return (
    <div className="grid items-start gap-x-8 gap-y-2 sm:grid-cols-[11rem_minmax(0,1fr)]">
      <p className="text-small text-ink-2">{name}</p>
      <div className="flex min-w-0 flex-wrap items-baseline gap-x-6 gap-y-3">{children}</div>
    </div>
  );
}
