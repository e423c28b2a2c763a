import { lazy, Suspense } from "react";
import type { OrderPlanValue, PlanOrder } from "#engine/plan/value.ts";
import { Formula } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { Decimal, decimalWidths } from "../parts/decimal.tsx";
import { Figure } from "../parts/figure.tsx";
import { sizeText, withUnit } from "../parts/number-text.ts";
import { plain } from "../parts/plot-scales.ts";
import { ResultTable } from "../parts/result-table.tsx";
import { Shifts } from "./shifts.tsx";

const Lattice = lazy(async () => ({ default: (await import("./lattice.tsx")).Lattice }));

/** The order to stop at, what is in and out, and how far the choice carries. */
export function OrderPlanResult({ value }: ResultProps<OrderPlanValue>) {
  const { orders, probe, firstOut, firstUnlisted } = value;
  const sums = decimalWidths(orders.map(({ sum }) => sizeText(sum)));
  const lefts = decimalWidths(orders.map(({ leftOut }) => sizeText(leftOut.used)));
  return (
    <>
      <p className="block-line block-verdict">
        <Decision value={value} />
      </p>
      <ResultTable<PlanOrder>
        caption="Orders, what they contain, and what is left out when one stops there"
        rows={orders}
        keyOf={keyOf}
        toneOf={({ included }) => (included ? null : "left-out")}
        columns={[
          {
            heading: "order",
            show: ({ order, included }) => (
              <>
                <Formula latex={`Q^{${order[0]?.latex ?? "0"}}`} />
                <span className="sr-only">{included ? ", in" : ", left out"}</span>
              </>
            ),
          },
          { heading: "contains", show: (order) => <Entries order={order} /> },
          {
            heading: "sum",
            numeric: true,
            show: ({ sum }) => <Decimal text={sizeText(sum)} widths={sums} />,
          },
          {
            heading: "left out",
            numeric: true,
            show: ({ leftOut }) => <Decimal text={sizeText(leftOut.used)} widths={lefts} />,
          },
          ...(orders.some(({ operators }) => operators !== undefined)
            ? [{ heading: "operators", numeric: true, show: ({ operators }: PlanOrder) => operators ?? "–" }]
            : []),
          { heading: "loops needed", numeric: true, show: ({ loops }) => loopsWords(loops) },
          {
            heading: (
              <>
                good up to <Formula latex={probe.latex} />
              </>
            ),
            numeric: true,
            show: ({ largestProbe, largestProbeIsHeavy }) =>
              `${withUnit(sizeText(largestProbe, 3), probe.unit)}${largestProbeIsHeavy ? " (Λ)" : ""}`,
          },
        ]}
      />
      <p className="block-line">
        First left out:{" "}
        {firstOut ? (
          <>
            <Formula latex={firstOut.latex} />, of order{" "}
            <Formula latex={`Q^{${firstOut.order[0]?.latex ?? ""}}`} />, size{" "}
            <Figure scalar="first-out/size">{sizeText(firstOut.size)}</Figure>
          </>
        ) : (
          <>
            nothing that is listed; unlisted terms begin at{" "}
            <Formula latex={`Q^{${firstUnlisted.order.latex}}`} />, natural size{" "}
            <Figure scalar="first-out/size">{sizeText(firstUnlisted.size)}</Figure>
          </>
        )}
        .
      </p>
      {value.lattice !== undefined && (
        <Suspense fallback={null}>
          <Lattice value={value} />
        </Suspense>
      )}
      <Shifts value={value} />
    </>
  );
}

function Decision({ value }: { readonly value: OrderPlanValue }) {
  const { order, target, leftOut, observable, parameters, largestProbe, largestProbeIsHeavy, probe } = value;
  const [Q] = parameters;
  const what = observable === "amplitude" ? "amplitude" : "rate";
  const left = <Figure scalar="left-out">{sizeText(leftOut.used)}</Figure>;
  return (
    <>
      {Q && (
        <>
          With <Formula latex={Q.latex === "Q" ? "Q" : `Q = ${Q.latex}`} /> ={" "}
          <Figure scalar="Q">{sizeText(Q.value, 3)}</Figure>,{" "}
        </>
      )}
      {order ? (
        <>
          a target of {plain(target)} on the {what} is met at order{" "}
          <strong>
            <Figure scalar="order">{order.text}</Figure>
          </strong>
          ; {left} is left out. It holds up to <Formula latex={probe.latex} /> ={" "}
          <Figure scalar="largest-probe">{withUnit(sizeText(largestProbe, 3), probe.unit)}</Figure>
          {largestProbeIsHeavy ? ", the heavy scale itself." : "."}
        </>
      ) : (
        <>
          a target of {plain(target)} on the {what} is{" "}
          <strong className="divergence-missing">not reached</strong> by these terms: {left} is left out at
          the highest order.
        </>
      )}
    </>
  );
}

function Entries({ order }: { readonly order: PlanOrder }) {
  if (order.entries.length === 0) return <span className="block-absent">nothing listed</span>;
  return (
    <ul className="plan-entries">
      {order.entries.map(({ id, latex, size, role, assigned }) => (
        <li key={id}>
          <Formula latex={latex} /> <span className="plan-size">{sizeText(size)}</span>
          {role === "square" && <span className="plan-note"> squared</span>}
          {assigned && <span className="plan-note"> by hand</span>}
        </li>
      ))}
      {order.count > order.entries.length && <li>and {order.count - order.entries.length} smaller ones</li>}
    </ul>
  );
}

function loopsWords({ insertions, needed }: PlanOrder["loops"]): string {
  return needed === null ? `up to ${insertions}` : String(needed);
}

function keyOf({ order }: PlanOrder): string {
  return order.map(({ text }) => text).join(" ");
}
