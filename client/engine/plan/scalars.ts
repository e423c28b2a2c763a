/** The numbers of an order plan that can be pinned into prose. */
import type { Scalar } from "../evaluation.ts";
import type { OrderPlanValue } from "./value.ts";

export function planScalars(value: OrderPlanValue): Scalar[] {
  const { order, leftOut, firstOut, firstUnlisted, parameters, probe, largestProbe, target } = value;
  const [Q] = parameters;
  const what = value.observable === "amplitude" ? "amplitude" : "rate";
  const number = (id: string, label: string, size: number, sigma = 0, unit = ""): Scalar => ({
    id,
    label,
    value: { type: "number", value: size, ...(sigma > 0 ? { sigma } : {}), ...(unit === "" ? {} : { unit }) },
  });
  return [
    ...(order
      ? [
          {
            id: "order",
            label: `order to stop at for a relative accuracy of ${target} of the ${what}`,
            value: { type: "exact", text: order.text },
          } as const,
        ]
      : []),
    ...(Q ? [number("Q", `expansion parameter $${Q.latex}$`, Q.value, Q.sigma)] : []),
    number(
      "left-out",
      `what is left out of the ${what} (${value.sumUsed === "natural tail" ? "listed terms and natural tail" : "listed terms"})`,
      leftOut.used,
      leftOut.sigma,
    ),
    number("left-out/listed", `listed terms left out of the ${what}`, leftOut.listed),
    number("left-out/unlisted", `estimate of unlisted terms left out of the ${what}`, leftOut.unlisted),
    firstOut
      ? number("first-out/size", `size of the first term left out, $${firstOut.latex}$`, firstOut.size)
      : number(
          "first-out/size",
          `natural size of the first unlisted term, of order ${firstUnlisted.order.text}`,
          firstUnlisted.size,
        ),
    number(
      "largest-probe",
      "largest probe scale at which this order meets the target",
      largestProbe,
      0,
      probe.unit,
    ),
    ...latticeScalars(value, number),
    ...value.terms.flatMap(({ rowId, latex, order: at, size }): Scalar[] => [
      number(`${rowId}/size`, `size of $${latex}$ at the probe scale`, size),
      { id: `${rowId}/order`, label: `order of $${latex}$`, value: { type: "exact", text: at.text } },
    ]),
  ];
}

type MakeNumber = (id: string, label: string, size: number, sigma?: number, unit?: string) => Scalar;

/** Of a plan in several parameters. */
function latticeScalars({ lattice, probe }: OrderPlanValue, number: MakeNumber): Scalar[] {
  if (!lattice) return [];
  const names = lattice.parameters.map(({ latex }) => `$${latex}$`).join(", ");
  const { leftOut, largestProbe, points } = lattice;
  return [
    number("lattice/left-out", `what is left out in powers of ${names}`, leftOut.value, leftOut.sigma),
    {
      id: "lattice/kept",
      label: `number of orders in ${names} that are kept`,
      value: { type: "exact", text: String(points.filter(({ included }) => included).length) },
    },
    ...(largestProbe === null
      ? []
      : [
          number(
            "lattice/largest-probe",
            `largest probe scale at which these orders in ${names} suffice`,
            largestProbe * probe.value,
            0,
            probe.unit,
          ),
        ]),
  ];
}
