import type { ExponentRow, FixedPointRow, RunningValue } from "#engine/running/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { sizeText } from "../parts/number-text.ts";
import { ResultTable } from "../parts/result-table.tsx";

interface Row extends ExponentRow {
  readonly point: FixedPointRow;
  readonly isFirst: boolean;
}

/** Every fixed point with the dimensions of operators there. */
export function FixedPoints({ value }: { readonly value: RunningValue }) {
  if (value.fixedPoints.length === 0 || !value.epsilon) return null;
  const epsilon = <Formula latex={`\\epsilon = ${value.epsilon.latex}`} />;
  return (
    <>
      <ResultTable<FixedPointRow>
        caption="Fixed points"
        rows={value.fixedPoints}
        keyOf={({ id }) => id}
        columns={[
          {
            heading: "fixed point",
            show: ({ couplings }) => <Formula latex={couplings.map(({ latex }) => latex).join(",\\;")} />,
          },
          {
            heading: <>couplings at {epsilon}</>,
            numeric: true,
            show: ({ id, couplings }) =>
              couplings.map((coupling, index) => (
                <span key={coupling.id}>
                  {index > 0 && ", "}
                  <Figure scalar={`${id}/${coupling.id}`}>{sizeText(coupling.value, 4)}</Figure>
                </span>
              )),
          },
          { heading: "at low energy", show: (row) => stability(row) },
          {
            heading: <Formula latex="\eta" />,
            show: ({ id, etas }) =>
              etas.map(({ field, latex, formula, value: eta }, index) => (
                <span key={field}>
                  {index > 0 && ", "}
                  <Formula latex={`\\eta_{${latex}} = ${formula}`} />{" "}
                  <Figure scalar={`${id}/${field}/eta`}>{eta === 0 ? "" : `(${sizeText(eta, 4)})`}</Figure>
                </span>
              )),
          },
        ]}
      />
      <ResultTable<Row>
        caption="Operators at the fixed points"
        rows={value.fixedPoints.flatMap((point) =>
          point.exponents.map((row, index) => ({ ...row, point, isFirst: index === 0 })),
        )}
        keyOf={({ id }) => id}
        columns={[
          {
            heading: "at",
            show: ({ point, isFirst }) =>
              isFirst ? <Formula latex={point.couplings.map(({ latex }) => latex).join(",\\;")} /> : "",
          },
          { heading: "operators", show: ({ operatorLatex }) => <Formula latex={operatorLatex} /> },
          { heading: <Formula latex="\omega" />, show: ({ slopeLatex }) => <Formula latex={slopeLatex} /> },
          {
            heading: <Formula latex="\Delta = d + \omega" />,
            show: ({ dimensionLatex }) => <Formula latex={dimensionLatex} />,
          },
          {
            heading: (
              <>
                <Formula latex="\Delta" /> at {epsilon}
              </>
            ),
            numeric: true,
            show: ({ id, dimension }) => <Figure scalar={`${id}/dimension`}>{sizeText(dimension, 4)}</Figure>,
          },
        ]}
      />
    </>
  );
}

function stability({ unstable }: FixedPointRow): string {
  if (unstable === 0) return "attracts";
  return unstable === 1 ? "repels in 1 direction" : `repels in ${unstable} directions`;
}
