import { Button } from "../../ui/button.tsx";
import { EmptyState } from "../../ui/empty-state.tsx";
import { Loading } from "../../ui/loading.tsx";
import { Formula, TextWithMath } from "../../ui/math.tsx";
import { Refusal } from "../../ui/refusal.tsx";
import { Family, Specimen } from "./specimen.tsx";

const colours = [
  "ink",
  "ink-2",
  "ink-3",
  "tick",
  "line",
  "hairline",
  "relevant",
  "marginal",
  "irrelevant",
  "hatch",
  "highlight",
] as const;

/** Nothing, not yet, not possible; and what all parts share. */
export function StateSpecimens() {
  return (
    <Family title="States, colours and letters">
      <Specimen name="nothing there">
        <EmptyState title="The shelf is empty">
          <p>Why it is empty, and the way on.</p>
          <Button>New notebook</Button>
        </EmptyState>
      </Specimen>
      <Specimen name="not yet">
        <Loading what="Opening the notebook" />
      </Specimen>
      <Specimen name="not possible">
        <Refusal sentence="The database cannot be reached." />
      </Specimen>
      <Specimen name="colours">
        {colours.map((name) => (
          <span key={name} className="inline-flex items-center gap-2 text-small">
            <svg width="20" height="12" aria-hidden="true" focusable="false">
              <rect width="20" height="12" fill={`var(--${name})`} />
            </svg>
            {name}
          </span>
        ))}
      </Specimen>
      <Specimen name="letters">
        <span className="engraved text-lead">Engraved lettering</span>
        <span className="font-prose text-prose">
          Prose beside <i>mathematics</i>, αβγ ΛΣΩ
        </span>
        <span className="font-notation text-small">c_6/(6! Λ^2) χ^6</span>
      </Specimen>
      <Specimen name="mathematics">
        <Formula latex={"\\frac{c_6}{6!\\,\\Lambda^{2}}\\,\\chi^{6}"} />
        <span>
          <TextWithMath text={"a phrase with $\\lambda\\phi^4$ in it"} />
        </span>
        <Formula latex={"\\frac{c_6}{"} />
      </Specimen>
    </Family>
  );
}
