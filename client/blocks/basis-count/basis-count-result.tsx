import type { BasisValue, ClassCount, CountText, DimensionCount } from "#engine/basis/value.ts";
import { useId, useMemo, useState } from "react";
import { Formula } from "../../ui/math.tsx";
import type { ResultProps } from "../block-parts.ts";
import { Figure } from "../parts/figure.tsx";
import { ResultTable } from "../parts/result-table.tsx";
import { classesAsCsv, classesAsLatex, contentLatex } from "./class-export.ts";
import { orders, searchClasses, sortClasses, type ClassOrder } from "./class-list.ts";

/** Totals by dimension; below them every field content, to be searched and sorted. */
export function BasisCountResult({ value }: ResultProps<BasisValue>) {
  return (
    <>
      <ResultTable<DimensionCount>
        caption="Operators by mass dimension"
        rows={value.totals}
        keyOf={({ dimension }) => dimension}
        columns={[
          { heading: "dimension", numeric: true, show: ({ dimension }) => dimension },
          {
            heading: value.symbolic ? <Formula latex={`n_f = ${value.flavours}`} /> : "operators",
            numeric: true,
            show: ({ dimension, total }) => (
              <Figure scalar={`total/${dimension}`}>{grouped(total.at)}</Figure>
            ),
          },
          ...(value.symbolic
            ? [
                {
                  heading: (
                    <>
                      for <Formula latex="n_f" /> flavours
                    </>
                  ),
                  show: ({ total }: DimensionCount) => <Formula latex={total.latex} />,
                },
              ]
            : []),
          { heading: "field contents", numeric: true, show: ({ classes }) => grouped(String(classes)) },
        ]}
      />
      <p className="block-line">
        Real parameters: an operator and its Hermitian conjugate count as two. Modulo integration by parts and
        equations of motion{value.withParity ? ", with parity" : ", both parities"}.
      </p>
      {value.classes.length > 0 && <Classes value={value} />}
    </>
  );
}

/** Long lists are drawn in pages. */
const PAGE = 25;

function Classes({ value }: { readonly value: BasisValue }) {
  const [open, setOpen] = useState(false);
  return (
    <details className="basis-classes" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary>
        by field content ({grouped(String(value.classes.length + value.classesLeftOut))} with operators)
      </summary>
      {open && <ClassTable value={value} />}
    </details>
  );
}

function ClassTable({ value }: { readonly value: BasisValue }) {
  const [search, setSearch] = useState("");
  const [order, setOrder] = useState<ClassOrder>("dimension");
  const [shown, setShown] = useState(PAGE);
  const id = useId();
  const found = useMemo(
    () => sortClasses(searchClasses(value.classes, search), order),
    [value.classes, search, order],
  );
  return (
    <>
      <div className="block-settings">
        <label htmlFor={`${id}-search`} className="block-label basis-search">
          search
          <input
            id={`${id}-search`}
            type="search"
            className="block-input"
            placeholder="H, D^2, 6"
            value={search}
            onChange={(event) => {
              setSearch(event.target.value);
              setShown(PAGE);
            }}
          />
        </label>
        <label htmlFor={`${id}-order`} className="block-label basis-search">
          order
          <select
            id={`${id}-order`}
            className="block-input block-choice"
            value={order}
            onChange={(event) =>
              setOrder(orders.find((known) => known === event.target.value) ?? "dimension")
            }
          >
            {orders.map((known) => (
              <option key={known}>{known}</option>
            ))}
          </select>
        </label>
      </div>
      <ResultTable<ClassCount>
        caption="Operators by field content"
        rows={found.slice(0, shown)}
        keyOf={(row) => row.id}
        columns={[
          { heading: "dimension", numeric: true, show: ({ dimension }) => dimension },
          { heading: "content", show: (row) => <Formula latex={contentLatex(row)} /> },
          {
            heading: value.symbolic ? <Formula latex={`n_f = ${value.flavours}`} /> : "operators",
            numeric: true,
            show: ({ number }) => grouped(number.at),
          },
          ...(value.symbolic ? [{ heading: "", show: symbolic }] : []),
        ]}
      />
      <p className="block-line" role="status">
        {found.length === 0
          ? "No field content like that."
          : `${Math.min(shown, found.length)} of ${found.length}.`}
        {value.classesLeftOut > 0 &&
          ` ${grouped(String(value.classesLeftOut))} more of the highest dimensions are in the totals only.`}{" "}
        {shown < found.length && (
          <button type="button" className="block-link" onClick={() => setShown(shown + 4 * PAGE)}>
            show more
          </button>
        )}{" "}
        <Downloads value={value} />
      </p>
    </>
  );
}

/** All of them, however many are shown. */
function Downloads({ value }: { readonly value: BasisValue }) {
  async function save(format: "CSV" | "LaTeX") {
    const { download } = await import("../../ui/download.ts");
    if (format === "CSV") download("operators.csv", "text/csv", classesAsCsv(value));
    else download("operators.tex", "application/x-tex", classesAsLatex(value));
  }
  return (
    <>
      Download {value.classesLeftOut > 0 ? "those listed" : "all"} as{" "}
      <button type="button" className="block-link" onClick={() => void save("CSV")}>
        CSV
      </button>{" "}
      <button type="button" className="block-link" onClick={() => void save("LaTeX")}>
        LaTeX
      </button>
    </>
  );
}

function symbolic({ number }: ClassCount) {
  return <Formula latex={number.latex} />;
}

/** @example grouped("75577476") // "75 577 476", in groups of three by narrow spaces */
export function grouped(digits: CountText["at"]): string {
  return digits.length <= 4 ? digits : digits.replace(/\B(?=(\d{3})+$)/g, "\u202f");
}
