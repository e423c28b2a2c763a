import { useId, useState } from "react";
import {
  isMissing,
  isNeeded,
  MOST_DRAWN,
  type ClosureValue,
  type DemandedOperator,
} from "#engine/closure/value.ts";
import { Formula } from "../../ui/math.tsx";
import { useBlock } from "../block-handle.ts";
import { Figure } from "../parts/figure.tsx";
import { GraphDrawing } from "../parts/graph-drawing.tsx";
import { ResultTable } from "../parts/result-table.tsx";

/** Long lists are drawn in pages. */
const PAGE = 12;

const choices = ["all that are demanded", "missing ones", "missing and not redundant"] as const;
type Choice = (typeof choices)[number];
const holds: Readonly<Record<Choice, (operator: DemandedOperator) => boolean>> = {
  "all that are demanded": () => true,
  "missing ones": isMissing,
  "missing and not redundant": isNeeded,
};

/** Every demanded operator with what demands it; a missing one can be added to the premises. */
export function Operators({ value }: { readonly value: ClosureValue }) {
  const { readOnly, standsOn, addToPremises } = useBlock();
  const [choice, setChoice] = useState<Choice>("all that are demanded");
  const [shown, setShown] = useState(PAGE);
  const [said, setSaid] = useState("");
  const id = useId();
  const found = value.operators.filter(holds[choice]);
  const needed = value.operators.filter(isNeeded);
  const canAdd = !readOnly && standsOn !== null;
  const add = (operators: readonly DemandedOperator[]) => {
    addToPremises(
      "terms",
      operators.map(({ term }) => ({ term })),
    );
    setSaid(
      operators.length === 1
        ? `${operators[0]?.text ?? ""} is added to the premises.`
        : `${operators.length} terms are added to the premises.`,
    );
  };
  return (
    <section aria-label="Demanded operators">
      <div className="block-settings">
        <label htmlFor={`${id}-show`} className="block-label basis-search">
          show
          <select
            id={`${id}-show`}
            className="block-input block-choice"
            value={choice}
            onChange={(event) => {
              setChoice(choices.find((known) => known === event.target.value) ?? "all that are demanded");
              setShown(PAGE);
            }}
          >
            {choices.map((known) => (
              <option key={known}>{known}</option>
            ))}
          </select>
        </label>
        {canAdd && needed.length > 1 && (
          <button type="button" className="block-link" onClick={() => add(needed)}>
            add all {needed.length} that are missing and not redundant
          </button>
        )}
      </div>
      <ResultTable<DemandedOperator>
        caption="Demanded operators: fields and derivatives; one stands for all its contractions"
        showCaption
        rows={found.slice(0, shown)}
        keyOf={({ key }) => key}
        columns={[
          {
            heading: "order in 1/Λ",
            numeric: true,
            show: ({ key, order }) => (
              <Figure scalar={`${key}/order`}>
                <Formula latex={order.latex} />
              </Figure>
            ),
          },
          { heading: "operator", show: ({ latex }) => <Formula latex={latex} /> },
          {
            heading: "dimension",
            numeric: true,
            show: ({ dimension }) => <Formula latex={dimension.latex} />,
          },
          { heading: "demanded by", show: (operator) => <Insertions operator={operator} /> },
          { heading: "loops", numeric: true, show: ({ loops }) => String(loops) },
          { heading: "graph", show: (operator) => <Drawing operator={operator} value={value} /> },
          { heading: "ω", numeric: true, show: ({ omega }) => <Formula latex={omega.latex} /> },
          {
            heading: value.regulator === "cutoff" ? "power of the cutoff" : "power of masses",
            numeric: true,
            show: ({ remainder }) => <Formula latex={remainder.latex} />,
          },
          { heading: "by parts, equations of motion", show: independenceWords },
          {
            heading: "in the premises",
            show: (operator) => (
              <Presence operator={operator} onAdd={canAdd ? () => add([operator]) : undefined} />
            ),
          },
        ]}
      />
      <p className="block-line">
        {found.length === 0 ? "None." : `${Math.min(shown, found.length)} of ${found.length}.`}
        {value.operators.length > MOST_DRAWN &&
          ` Graphs are drawn for the first ${MOST_DRAWN} of all ${value.operators.length} operators.`}{" "}
        {shown < found.length && (
          <button type="button" className="block-link" onClick={() => setShown(shown + 2 * PAGE)}>
            show more
          </button>
        )}{" "}
        <span role="status">{said}</span>
      </p>
    </section>
  );
}

function Insertions({ operator: { vertices } }: { readonly operator: DemandedOperator }) {
  return (
    <>
      {vertices.map(({ latex, count, termRowId }, index) => (
        <span key={latex}>
          {index > 0 && ", "}
          {count > 1 && `${String(count)} × `}
          <Formula latex={latex} />
          {termRowId === null && <span className="sr-only"> (itself demanded)</span>}
        </span>
      ))}
    </>
  );
}

function Drawing({
  operator: { graph, kinds },
  value,
}: {
  readonly operator: DemandedOperator;
  readonly value: ClosureValue;
}) {
  if (!graph) return <>not drawn</>;
  return (
    <span className="closure-drawing">
      <GraphDrawing graph={graph} fields={value.fields} kinds={kinds} />
    </span>
  );
}

function independenceWords({ independence, structures }: DemandedOperator): string {
  return independence === "independent" && structures !== null && structures > 1
    ? `${String(structures)} independent ones`
    : independence;
}

function Presence({
  operator,
  onAdd,
}: {
  readonly operator: DemandedOperator;
  readonly onAdd: (() => void) | undefined;
}) {
  const { presentAs, supposed, derivatives, timeDerivatives, gauge, term, text } = operator;
  if (presentAs !== null) return <span className="premises-allowed">present</span>;
  if (supposed) return <>the field’s own {derivatives + timeDerivatives > 0 ? "kinetic" : "mass"} term</>;
  return (
    <>
      <strong className="divergence-missing">
        missing{gauge === "restricted" ? ", in gauge-invariant form" : ""}
      </strong>
      {onAdd && (
        <>
          {" "}
          <button
            type="button"
            className="block-link"
            data-copied="no"
            title={term}
            aria-label={`add to the premises: ${text}`}
            onClick={onAdd}
          >
            add to the premises
          </button>
        </>
      )}
    </>
  );
}
