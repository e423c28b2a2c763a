import { lazy, Suspense } from "react";
import type { GraphDivergence, Meaning } from "#engine/divergence/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { Counterterms } from "./counterterms.tsx";

const GraphPictures = lazy(async () => ({
  default: (await import("./graph-pictures.tsx")).GraphPictures,
}));

const meaningWords: Readonly<Record<Meaning, string>> = {
  tree: "a tree: no loop integral",
  convergent: "converges overall; subgraphs may still diverge",
  pole: "a pole, with the counterterms below",
  "no pole: odd dimension, odd loops": "no pole: dimension and number of loops are odd",
  "no pole: no analytic counterterm": "no pole: no analytic counterterm has the right dimension",
  "no pole: Schrödinger, odd D·L": "no pole: after the energy integrals, D·L is odd",
  "vanishes: retarded loop": "vanishes: a closed loop of retarded propagators",
  "logarithm of the cutoff": "a logarithm of the cutoff",
  "powers of the cutoff": "powers of the cutoff",
  "powers and a logarithm of the cutoff": "powers and a logarithm of the cutoff",
  depends: "depends on the dimension",
};

/** The degree of one graph, both ways it was computed, and what follows. */
export function GraphResult({ value }: { readonly value: GraphDivergence }) {
  const { omega, loops, legs, logarithmicAt, counterterms } = value;
  return (
    <>
      <dl className="block-facts">
        <dt>degree of divergence</dt>
        <dd>
          <Formula latex="\omega =" />{" "}
          <Figure scalar="omega">
            <Formula latex={omega.latex} />
          </Figure>
          , <Figure scalar="verdict">{verdictWords(value)}</Figure>
        </dd>
        <dt>loops</dt>
        <dd>
          <Formula latex="L =" /> <Figure scalar="loops">{String(loops)}</Figure>
          {legs.total > 0 && (
            <>
              , legs <Formula latex={legs.latex} />
            </>
          )}
        </dd>
        <dt>by lines and loops</dt>
        <dd>
          <Formula latex={value.byMomenta} />
        </dd>
        <dt>by legs and vertices</dt>
        <dd>
          <Formula latex={value.byDimensions} />
        </dd>
        {logarithmicAt && (
          <>
            <dt>logarithmic</dt>
            <dd>
              at <Formula latex={`${logarithmicAt.symbol} = ${logarithmicAt.value.latex}`} />, a power{" "}
              {logarithmicAt.growsAbove ? "above" : "below"}
            </dd>
          </>
        )}
        <dt>dimensional regularisation</dt>
        <dd>{meaningWords[value.dimensional]}</dd>
        <dt>with a cutoff</dt>
        <dd>
          {meaningWords[value.cutoff]}
          {value.cutoffPower && (
            <>
              , up to <Formula latex={`\\Lambda_c^{${value.cutoffPower.latex}}`} />
            </>
          )}
        </dd>
      </dl>
      {value.pictures === null && (
        <p className="block-line">
          Graphs are drawn up to six loops, ten legs and twelve vertices, four of them with a single leg.
        </p>
      )}
      {/* Results kept from before graphs were drawn have none. */}
      {value.pictures && (
        <Suspense fallback={null}>
          <GraphPictures pictures={value.pictures} />
        </Suspense>
      )}
      {counterterms.length > 0 && (
        <Counterterms caption="Counterterms it demands" counterterms={counterterms} />
      )}
    </>
  );
}

function verdictWords({ verdict }: GraphDivergence): string {
  switch (verdict) {
    case "tree":
      return "a tree";
    case "convergent":
      return "convergent";
    case "logarithmic":
      return "logarithmic";
    case "power":
      return "a power";
    case "depends":
      return "depends on the dimension";
  }
}
