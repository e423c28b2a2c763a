import type { CountedTerm, CountingValue, OrderVector } from "#engine/counting/value.ts";
import { Formula, TextWithMath } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { Decimal, decimalWidths } from "../parts/decimal.tsx";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";

/** Is it dimensional analysis? Then every term by these rules and by dimension, side by side; then the graph. */
export function CountingRulesResult({ value }: ResultProps<CountingValue>) {
  const { parameters, graph } = value;
  const names = parameters.map(({ latex }) => latex).join(",\\,");
  const widths = decimalWidths(value.terms.flatMap(({ size }) => (size ? [size.text] : [])));
  const isSized = value.terms.some(({ size }) => size !== null);
  return (
    <>
      <p className="block-line block-verdict">
        <Verdict value={value} />
      </p>
      <ResultTable<CountedTerm>
        caption="Order of every term by these rules and by dimension"
        rows={value.terms}
        keyOf={({ termId }) => termId}
        toneOf={({ allowed, changes }) => (!allowed ? "left-out" : changes > 0 ? "chosen" : null)}
        columns={[
          { heading: "term", show: ({ latex }) => <Formula latex={latex} /> },
          {
            heading: (
              <>
                order in <Formula latex={names} />
              </>
            ),
            show: ({ termId, orderLatex }) =>
              orderLatex ? <Order id={`${termId}/order`} order={orderLatex} value={value} /> : <Absent />,
          },
          ...(isSized
            ? [
                {
                  heading: "size",
                  numeric: true,
                  show: ({ termId, size }: CountedTerm) =>
                    size ? (
                      <Figure scalar={`${termId}/size`}>
                        <Decimal text={size.text} widths={widths} />
                      </Figure>
                    ) : (
                      <Absent />
                    ),
                },
              ]
            : []),
          { heading: "by dimension", show: ({ byDimension }) => <Formula latex={byDimension.latex} /> },
          { heading: "place", show: (term) => <Places term={term} /> },
        ]}
      />
      {graph && (
        <>
          <p className="block-line">
            The graph with{" "}
            {graph.legsLatex === "1" ? (
              "no legs"
            ) : (
              <>
                legs <Formula latex={graph.legsLatex} />
              </>
            )}{" "}
            and {loopWords(graph.loops)} counts <Order id="graph/order" order={graph.order} value={value} />
            {graph.size && (
              <>
                , which is <Figure scalar="graph/size">{graph.size.text}</Figure>
              </>
            )}
            ; with the wave functions of its legs <Formula latex={vectorLatex(graph.withLegs)} />. Counted
            line by line and from its vertices alone, alike.
          </p>
        </>
      )}
      <p className="block-line block-caution">
        {value.isEdited && "These rules were changed; as published they assume: "}
        <TextWithMath text={value.conventions} />
      </p>
    </>
  );
}

function loopWords(loops: number): string {
  return loops === 0 ? "no loop" : loops === 1 ? "one loop" : `${String(loops)} loops`;
}

const Absent = () => <span className="block-absent">–</span>;

function vectorLatex(order: OrderVector): string {
  const parts = order.map(({ latex }) => latex);
  return parts.length === 1 ? (parts[0] ?? "0") : `(${parts.join(",\\,")})`;
}

function Order({ id, order, value }: { id: string; order: OrderVector; value: CountingValue }) {
  if (order.length === 1)
    return (
      <Figure scalar={id}>
        <Formula latex={order[0]?.latex ?? "0"} />
      </Figure>
    );
  return (
    <span className="counting-order">
      {order.map(({ latex }, index) => (
        <Figure
          key={value.parameters[index]?.id ?? index}
          scalar={`${id}/${value.parameters[index]?.symbol ?? ""}`}
        >
          <Formula latex={latex} />
        </Figure>
      ))}
    </span>
  );
}

function Places({ term: { place, placeByDimension, changes } }: { readonly term: CountedTerm }) {
  if (place === null || placeByDimension === null) return <Absent />;
  if (changes === 0) return <>{place}</>;
  return (
    <strong>
      {place}, by dimension {placeByDimension}
      <span aria-hidden="true"> {place < placeByDimension ? "↑" : place > placeByDimension ? "↓" : "↕"}</span>
    </strong>
  );
}

function Verdict({ value: { verdict, changed, terms } }: { readonly value: CountingValue }) {
  switch (verdict) {
    case "just by dimension":
      return (
        <>
          This counting is <Figure scalar="verdict">just by dimension</Figure>.
        </>
      );
    case "same sequence":
      return (
        <>
          Other numbers than dimensions, but the terms stand{" "}
          <Figure scalar="verdict">in the sequence of dimensions</Figure>.
        </>
      );
    case "another sequence":
      return (
        <>
          This counting is <Figure scalar="verdict">not by dimension</Figure>:{" "}
          <Figure scalar="changed">{changed}</Figure> of {terms.length} terms change place.
        </>
      );
    case "not comparable":
      return (
        <>
          With these parameters the sequence of terms is <Figure scalar="verdict">not comparable</Figure> to
          that of dimensions: give the parameters numbers.
        </>
      );
  }
}
