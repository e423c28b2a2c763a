/** The numbers of a closure that can be pinned into prose. */
import type { Scalar } from "../evaluation.ts";
import type { ClosureValue } from "./value.ts";

export function closureScalars(value: ClosureValue): Scalar[] {
  const { operators, orders, missing, missingNotRedundant, firstMissing, verdict, caps } = value;
  const within = `up to order ${caps.order.text} in $1/\\Lambda$`;
  const exact = (id: string, label: string, text: string): Scalar => ({
    id,
    label,
    value: { type: "exact", text },
  });
  return [
    {
      id: "closed",
      label: `whether the premises are closed ${within}`,
      value: { type: "word", text: verdict },
    },
    exact("demanded", `operators demanded ${within}`, String(operators.length)),
    exact("missing", `demanded operators that the premises lack, ${within}`, String(missing)),
    exact(
      "missing/needed",
      `missing operators ${within} that are not known to be redundant`,
      String(missingNotRedundant),
    ),
    ...(firstMissing
      ? [
          exact(
            "missing/first",
            "order in $1/\\Lambda$ at which the premises first lack an operator that is not redundant",
            firstMissing.text,
          ),
        ]
      : []),
    ...orders.flatMap(({ order, demanded, missing: lacking, size }) => [
      exact(
        `order/${order.text}/demanded`,
        `operators first demanded at order ${order.text}`,
        String(demanded),
      ),
      exact(`order/${order.text}/missing`, `of them missing at order ${order.text}`, String(lacking)),
      exact(
        `order/${order.text}/size`,
        `operators of the closed set up to order ${order.text}`,
        String(size),
      ),
    ]),
    ...operators.map(({ key, latex, order }) =>
      exact(`${key}/order`, `order in $1/\\Lambda$ at which $${latex}$ is demanded`, order.text),
    ),
  ];
}
