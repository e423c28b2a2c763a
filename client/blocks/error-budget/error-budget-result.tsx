import type { BudgetRow, BudgetValue } from "#engine/budget/value.ts";
import type { ResultProps } from "../block-parts.ts";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";

/** The result as papers print it, and below it what it is made of, each with a bar of its size. */
export function ErrorBudgetResult({ value }: ResultProps<BudgetValue>) {
  const largest = Math.max(...value.rows.map(({ size }) => Math.abs(size)), 0);
  return (
    <>
      <p className="block-line budget-result">
        {value.quantity !== "" && `${value.quantity}: `}
        {value.value === null ? value.sentence : <Figure scalar="result">{value.sentence}</Figure>}
        {value.brackets.length > 0 && <span className="budget-brackets"> ({value.brackets.join(", ")})</span>}
      </p>
      <ResultTable<BudgetRow>
        caption="What makes the value uncertain"
        rows={value.rows}
        keyOf={({ rowId }) => rowId}
        columns={[
          { heading: "source", show: ({ name, kind }) => name || kind },
          { heading: "kind", show: ({ kind }) => kind },
          {
            heading: "size",
            numeric: true,
            show: ({ rowId, text }) => <Figure scalar={`${rowId}/size`}>{text}</Figure>,
          },
          {
            heading: "",
            show: ({ size }) => (
              <Bar part={largest === 0 ? 0 : Math.abs(size) / largest} opposed={size < 0} />
            ),
          },
          {
            heading: "of the variance",
            numeric: true,
            show: ({ share }) => (share === null ? "–" : `${Math.round(share * 100)} %`.replace("-", "−")),
          },
        ]}
      />
      <p className="block-line">
        Together <Figure scalar="total">{value.totalText}</Figure>, added {value.combine}.
      </p>
    </>
  );
}

const WIDTH = 120;

/** A bar by its length; hatched when it moves against its group. The size beside it says the same. */
function Bar({ part, opposed }: { readonly part: number; readonly opposed: boolean }) {
  return (
    <svg width={WIDTH} height={10} aria-hidden="true" className="budget-bar">
      <rect
        x={0.5}
        y={1.5}
        width={Math.max(1, part * (WIDTH - 1))}
        height={7}
        className={opposed ? "budget-bar-opposed" : "budget-bar-full"}
      />
    </svg>
  );
}
