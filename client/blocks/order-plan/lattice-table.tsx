import type { LatticePoint, PlanLattice } from "#engine/plan/lattice.ts";
import { Formula } from "../../ui/math.tsx";
import { sizeText } from "../parts/number-text.ts";
import { ResultTable } from "../parts/result-table.tsx";

/** Orders of an amplitude in several small parameters, largest first, and the cut between them. */
export function LatticeTable({ lattice }: { readonly lattice: PlanLattice | null }) {
  if (!lattice)
    return (
      <p className="block-line">
        No lattice of orders: each parameter of the counting needs a size below 1, and there may be no more
        than 2000 orders.
      </p>
    );
  return (
    <>
      <p className="block-line">
        Lattice of orders of an amplitude, from listed terms with natural coefficients: cut where the sum of
        what is left out falls below the target.
      </p>
      <ResultTable<LatticePoint>
        caption="Lattice of orders, largest first, and what is left out when one stops there"
        rows={lattice.points}
        keyOf={({ order }) => order.join(" ")}
        toneOf={({ included }) => (included ? null : "left-out")}
        columns={[
          ...lattice.parameters.map(({ latex }, at) => ({
            heading: (
              <>
                power of <Formula latex={latex} />
              </>
            ),
            numeric: true,
            show: ({ order }: LatticePoint) => order[at] ?? "0",
          })),
          { heading: "products", numeric: true, show: ({ count }) => count },
          { heading: "size of each", numeric: true, show: ({ size }) => sizeText(size) },
          { heading: "left out", numeric: true, show: ({ leftOut }) => sizeText(leftOut) },
          { heading: "", show: ({ included }) => (included ? "in" : "left out") },
        ]}
      />
    </>
  );
}
