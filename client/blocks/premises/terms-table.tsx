import type { BlockRow } from "#engine/notebook/block-instance.ts";
import type { PremisesValue } from "#engine/premises/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { termsOf } from "./lagrangian-terms.ts";
import { RowTable } from "../parts/row-table.tsx";

type Term = PremisesValue["terms"][number];

/** The terms of the Lagrangian as typed, and beside each how it was understood. */
export function TermsTable({ value }: { readonly value: PremisesValue | null }) {
  const terms = new Map(value?.terms.map((term) => [term.rowId, term]));
  const show = (draw: (term: Term) => React.ReactNode) => (row: BlockRow) => {
    const term = terms.get(row.id);
    return term ? draw(term) : null;
  };
  return (
    <RowTable
      table="terms"
      noun="term"
      caption="Terms of the Lagrangian"
      nameOf={(row) => row["term"] ?? ""}
      invitation="lambda/4! phi^4"
      columns={[
        {
          column: "term",
          heading: "term, as typed",
          size: 24,
          placeholder: "lambda/4! phi^4",
          // A table copied from a spreadsheet is one, whatever signs stand in it.
          linesOf: (text) => (text.includes("\t") ? null : termsOf(text)),
        },
        { column: "natural", heading: "ĝ", size: 5, placeholder: "1" },
        { column: "assigned", heading: "size by hand", size: 9, placeholder: "by dimension" },
        { column: "meaning", heading: "meaning", notation: false, size: 12 },
      ]}
      results={[
        { heading: "reads as", show: show((term) => <Formula latex={term.latex} />) },
        {
          heading: "dimension",
          show: show((term) => (
            <Figure scalar={`${term.rowId}/dimension`}>
              <Formula latex={term.dimension.latex} />
            </Figure>
          )),
        },
        { heading: "symmetries", show: show((term) => <Verdict term={term} />) },
      ]}
    />
  );
}

function Verdict({ term }: { readonly term: Term }) {
  if (term.kinetic) return <span className="premises-kinetic">kinetic</span>;
  if (term.allowed) return <span className="premises-allowed">allowed</span>;
  return <span className="premises-forbidden">forbidden by {term.forbiddenBy.join(", ")}</span>;
}
