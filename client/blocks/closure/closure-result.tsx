import type { ClosedOrder, ClosureValue } from "#engine/closure/value.ts";
import { Formula } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";
import "./closure.css";
import { Operators } from "./operators.tsx";

/** Whether the premises are closed, what enters at each order, and every demanded operator with its graph. */
export function ClosureResult({ value }: ResultProps<ClosureValue>) {
  return (
    <>
      <Verdict value={value} />
      <ResultTable<ClosedOrder>
        caption="The closed set, order by order: what enters"
        showCaption
        rows={value.orders}
        keyOf={({ order }) => order.text}
        columns={[
          { heading: "order in 1/Λ", numeric: true, show: ({ order }) => <Formula latex={order.latex} /> },
          {
            heading: "demanded",
            numeric: true,
            show: ({ order, demanded }) => (
              <Figure scalar={`order/${order.text}/demanded`}>{String(demanded)}</Figure>
            ),
          },
          {
            heading: "missing",
            numeric: true,
            show: ({ order, missing }) => (
              <Figure scalar={`order/${order.text}/missing`}>{String(missing)}</Figure>
            ),
          },
          {
            heading: "closed set so far",
            numeric: true,
            show: ({ order, size }) => <Figure scalar={`order/${order.text}/size`}>{String(size)}</Figure>,
          },
          { heading: "enters (new ones underlined)", show: (order) => <Enters order={order} /> },
        ]}
      />
      {value.operators.length === 0 ? (
        <p className="block-line">No graph within these caps demands an operator.</p>
      ) : (
        <Operators value={value} />
      )}
    </>
  );
}

const verdictWords: Readonly<Record<ClosureValue["verdict"], string>> = {
  closed: "closed",
  "closed up to redundant operators": "closed up to redundant operators",
  "not closed": "not closed",
};

function Verdict({ value }: { readonly value: ClosureValue }) {
  const { verdict, operators, missing, missingNotRedundant, firstMissing, caps } = value;
  return (
    <p className="block-line block-verdict">
      Up to order <Formula latex={caps.order.latex} /> in <Formula latex="1/\Lambda" />, {caps.loops}{" "}
      {caps.loops === 1 ? "loop" : "loops"} and {caps.legs} legs the premises are{" "}
      <Figure scalar="closed">{verdictWords[verdict]}</Figure>
      {operators.length > 0 && (
        <>
          : of <Figure scalar="demanded">{String(operators.length)}</Figure> demanded operators{" "}
          <Figure scalar="missing">{String(missing)}</Figure> {missing === 1 ? "is" : "are"} missing
          {missing > 0 && (
            <>
              , <Figure scalar="missing/needed">{String(missingNotRedundant)}</Figure> of them not known to be
              redundant
            </>
          )}
          {firstMissing && (
            <>
              , from order{" "}
              <Figure scalar="missing/first">
                <Formula latex={firstMissing.latex} />
              </Figure>{" "}
              on
            </>
          )}
        </>
      )}
      .
    </p>
  );
}

/** Longer lists are in the table of operators. */
const MOST_NAMED = 24;

function Enters({ order: { enters } }: { readonly order: ClosedOrder }) {
  return (
    <span className="closure-set">
      {enters.slice(0, MOST_NAMED).map(({ latex, isNew }, index) => (
        // The list is of one result and never reordered.
        <span key={index}>
          {index > 0 && ", "}
          <span className={isNew ? "closure-set-new" : undefined}>
            <Formula latex={latex} />
            {isNew && <span className="sr-only"> (new)</span>}
          </span>
        </span>
      ))}
      {enters.length > MOST_NAMED && ` and ${String(enters.length - MOST_NAMED)} more`}
    </span>
  );
}
