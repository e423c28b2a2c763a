import { useId, type ReactNode } from "react";

/** A part of the page under an engraved rule. */
export function Section({
  title,
  note,
  children,
}: {
  readonly title: string;
  readonly note?: ReactNode;
  readonly children: ReactNode;
}) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="tick-rule mt-10 pt-5">
      <h2 id={id} className="engraved text-lead font-semibold">
        {title}
      </h2>
      {note && <p className="mt-1 text-small text-ink-2">{note}</p>}
      {children}
    </section>
  );
}
