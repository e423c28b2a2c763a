import type { Counterterm } from "#engine/divergence/value.ts";
import { Formula } from "../../ui/math.tsx";
import { ResultTable } from "../parts/result-table.tsx";

/** Operators that a divergence demands: whether they stand in the premises, and at which order they enter. */
export function Counterterms({
  caption,
  counterterms,
}: {
  readonly caption: string;
  readonly counterterms: readonly Counterterm[];
}) {
  return (
    <ResultTable<Counterterm>
      caption={caption}
      showCaption
      rows={counterterms}
      keyOf={({ text, massPower }) => `${text} ${massPower.text}`}
      toneOf={({ allowed, analytic }) => (allowed && analytic ? null : "left-out")}
      columns={[
        { heading: "operator", show: ({ latex }) => <Formula latex={latex} /> },
        { heading: "dimension", show: ({ dimension }) => <Formula latex={dimension.latex} /> },
        { heading: "power of masses", show: ({ massPower }) => <Formula latex={massPower.latex} /> },
        { heading: "order in 1/Λ", show: ({ order }) => <Formula latex={order.latex} /> },
        { heading: "in the premises", show: (counterterm) => <Presence counterterm={counterterm} /> },
      ]}
    />
  );
}

function Presence({
  counterterm: { presentAs, allowed, analytic, gauge, kinetic, derivatives, timeDerivatives },
}: {
  readonly counterterm: Counterterm;
}) {
  if (!allowed) return <>forbidden by symmetry</>;
  if (gauge === "excluded") return <>excluded by gauge invariance</>;
  if (!analytic) return <>no pole: a power of the cutoff only</>;
  if (presentAs !== null) return <span className="premises-allowed">present</span>;
  if (kinetic) return <>the field’s own {derivatives + timeDerivatives > 0 ? "kinetic" : "mass"} term</>;
  return (
    <strong className="divergence-missing">
      missing{gauge === "restricted" ? ", in gauge-invariant form" : ""}
    </strong>
  );
}
