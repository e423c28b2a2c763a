import type { RefereeView } from "#contract/api.ts";
import type { ReactNode } from "react";
import { useConnection } from "../../editor/notebook-context.ts";
import { usePinCounts } from "../../editor/pins/use-pin-counts.ts";
import { Button } from "../../ui/button.tsx";
import { linkClasses } from "../../ui/text-link.tsx";
import { CHECK_SHEET } from "./anchors.ts";

interface Props {
  readonly view: RefereeView;
  readonly onVary: () => void;
}

/** What one is looking at, by whom, until when; and what a reader can do with it. */
export function ReadingStrip({ view, onVary }: Props) {
  const connection = useConnection();
  const mayVary = connection?.loaded === true && connection.phase !== "refused";
  return (
    <Strip label="About this page">
      <p className="referee-words">
        You are reading a live notebook, read-only: what its authors change appears here as they change it.{" "}
        {view.authors === null ? "Its authors are not named." : `Written by ${sayNames(view.authors)}.`}{" "}
        {view.expiresAt === null ? (
          "This link holds until the authors close it."
        ) : (
          <>
            This link holds until <Until at={view.expiresAt} />.
          </>
        )}
      </p>
      <p className="referee-tools">
        <ToCheckSheet />
        <Button onClick={onVary} disabled={!mayVary}>
          Vary the inputs in a scratch copy
        </Button>
      </p>
    </Strip>
  );
}

export function Strip({ label, children }: { readonly label: string; readonly children: ReactNode }) {
  return (
    <section aria-label={label} className="referee-strip">
      {children}
    </section>
  );
}

/** A plain anchor: the browser moves the focus with the view. */
export function ToCheckSheet() {
  const { all, moved, loose } = usePinCounts();
  const counted = [
    `${all} ${all === 1 ? "number" : "numbers"}`,
    ...(moved > 0 ? [`${moved} moved`] : []),
    ...(loose > 0 ? [`${loose} loose`] : []),
  ];
  return (
    <a className={linkClasses} href={`#${CHECK_SHEET}`}>
      Check sheet{all > 0 && `: ${counted.join(", ")}`}
    </a>
  );
}

function Until({ at }: { readonly at: string }) {
  return (
    <time dateTime={at}>
      {new Date(at).toLocaleString("en-GB", { dateStyle: "long", timeStyle: "short" })}
    </time>
  );
}

/** @example sayNames(["A", "B", "C"]) // "A, B and C" */
export function sayNames(names: readonly string[]): string {
  if (names.length === 0) return "nobody who is still in it";
  const last = names.at(-1) ?? "";
  return names.length === 1 ? last : `${names.slice(0, -1).join(", ")} and ${last}`;
}
