/** What of counting rules can be pinned into prose. */
import type { Scalar } from "../evaluation.ts";
import { numberValue } from "../premises/scalars.ts";
import type { CountingValue, OrderVector } from "./value.ts";

const verdictWords: Readonly<Record<CountingValue["verdict"], string>> = {
  "just by dimension": "just by dimension",
  "same sequence": "in the sequence of dimensions",
  "another sequence": "not by dimension",
  "not comparable": "not comparable",
};

/** Ids: "<term>/order" ("<term>/order/<parameter>" of several), "<term>/size"; "graph/order", "graph/size"; "verdict", "changed". */
export function countingScalars(value: CountingValue): Scalar[] {
  const { parameters } = value;
  const orders = (id: string, what: string, order: OrderVector | null): Scalar[] =>
    (order ?? []).map(({ text }, index): Scalar => {
      const parameter = parameters[index];
      const several = parameters.length > 1;
      return {
        id: several ? `${id}/${parameter?.symbol ?? String(index)}` : id,
        label: several ? `${what} in $${parameter?.latex ?? ""}$` : what,
        value: { type: "exact", text },
      };
    });
  const at = parameters.map(({ latex }) => latex).join(",\\,");
  const sized = (id: string, what: string, size: CountingValue["terms"][number]["size"]): Scalar[] =>
    size ? [{ id, label: what, value: numberValue(size.value, size.sigma, size.unit) }] : [];
  const graph = value.graph;
  return [
    ...value.terms.flatMap(({ termId, latex, orderLatex, size }) => [
      ...orders(`${termId}/order`, `order of $${latex}$`, orderLatex),
      ...sized(`${termId}/size`, `size of $${latex}$ at this $${at}$`, size),
    ]),
    ...(graph
      ? [
          ...orders("graph/order", `order of the graph with legs $${graph.legsLatex}$`, graph.order),
          ...sized("graph/size", `size of the graph with legs $${graph.legsLatex}$`, graph.size),
        ]
      : []),
    {
      id: "verdict",
      label: "how this counting compares",
      value: { type: "word", text: verdictWords[value.verdict] },
    },
    {
      id: "changed",
      label: "number of terms that change place against dimension",
      value: { type: "exact", text: String(value.changed) },
    },
  ];
}
