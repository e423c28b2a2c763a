import { PageFrame } from "../../ui/page-frame.tsx";
import { BlockSpecimens } from "./block-specimens.tsx";
import { ControlSpecimens } from "./control-specimens.tsx";
import { RulerSpecimens } from "./ruler-specimens.tsx";
import { StateSpecimens } from "./state-specimens.tsx";

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
      <RulerSpecimens />
    </PageFrame>
  );
}
