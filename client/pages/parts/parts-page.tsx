import { lazy, Suspense } from "react";
import { Loading } from "../../ui/loading.tsx";
import { PageFrame } from "../../ui/page-frame.tsx";
import { BlockSpecimens } from "./block-specimens.tsx";
import { ControlSpecimens } from "./control-specimens.tsx";
import { FieldSpecimens } from "./field-specimens.tsx";
import { LetterSpecimens } from "./letter-specimens.tsx";
import { RulerSpecimens } from "./ruler-specimens.tsx";
import { Family } from "./specimen.tsx";
import { StateSpecimens } from "./state-specimens.tsx";

const NotebookSpecimen = lazy(async () => ({
  default: (await import("./notebook-specimen.tsx")).NotebookSpecimen,
}));

/** For contributors: every part in every state, so that a change of one is seen beside all the others. */
export function PartsPage() {
  return (
    <PageFrame title="Parts">
      <h1 className="font-prose text-title leading-tight">Parts</h1>
      <p className="mt-3 max-w-(--measure) text-ink-2">
        What the pages are made of, each in every state it can be in. Look at it in both lights, at 390 px, in
        greyscale and by keyboard before a change of a part goes out. Nothing here is kept or sent.
      </p>
      <ControlSpecimens />
      <StateSpecimens />
      <BlockSpecimens />
      <FieldSpecimens />
      <RulerSpecimens />
      <LetterSpecimens />
      <Family title="A page of a notebook">
        <Suspense fallback={<Loading what="Opening the page" />}>
          <NotebookSpecimen />
        </Suspense>
      </Family>
    </PageFrame>
  );
}
