import type { LatticePoint, PlanLattice } from "#engine/plan/lattice.ts";
import type { LatticeMove } from "#engine/plan/lattice-moves.ts";
import type { OrderPlanValue } from "#engine/plan/value.ts";
import { Formula } from "../../ui/math.tsx";
import { Figure } from "../parts/figure.tsx";
import { sizeText, withUnit } from "../parts/number-text.ts";
import { ResultTable } from "../parts/result-table.tsx";
import { LatticeDrawing } from "./lattice-drawing.tsx";

/** Orders of an amplitude in several small parameters, largest first, and the cut between them. */
export function Lattice({ value }: { readonly value: OrderPlanValue }) {
  const { lattice, probe } = value;
  if (!lattice)
    return (
      <p className="block-line">
        No lattice of orders: each parameter of the counting needs a size below 1, and there may be no more
        than 2000 orders.
      </p>
    );
  const { leftOut, largestProbe, parameters } = lattice;
  const names = parameters.map(({ latex }) => latex).join(",\\,");
  return (
    <section className="plan-lattice" aria-label="Lattice of orders">
      <p className="block-line">
        In powers of <Formula latex={names} /> the amplitude keeps{" "}
        <Figure scalar="lattice/kept">{lattice.points.filter(({ included }) => included).length}</Figure>{" "}
        orders of {lattice.points.length}; all others add up to{" "}
        <Figure scalar="lattice/left-out">
          {sizeText(leftOut.value)}
          {leftOut.sigma > 0 ? ` ± ${sizeText(leftOut.sigma, 2)}` : ""}
        </Figure>
        .
        {largestProbe !== null && (
          <>
            {" "}
            They suffice up to p ={" "}
            <Figure scalar="lattice/largest-probe">
              {withUnit(sizeText(largestProbe * probe.value, 3), probe.unit)}
            </Figure>
            .
          </>
        )}
        {passedOver(lattice)}
      </p>
      {parameters.length === 2 ? (
        <LatticeDrawing lattice={lattice} />
      ) : (
        <p className="block-line block-caution">
          {parameters.length === 1
            ? "One parameter has one row of orders; the table says all."
            : "More than two parameters are not drawn; the table says all."}
        </p>
      )}
      <LatticeTable lattice={lattice} />
      <Moves moves={lattice.moves} />
    </section>
  );
}

function passedOver({ passedOver: { withoutOrder, notSmall } }: PlanLattice): string {
  const said = [
    withoutOrder === 0 ? "" : `${String(withoutOrder)} without an order`,
    notSmall === 0 ? "" : `${String(notSmall)} not smaller than the leading amplitude`,
  ].filter((one) => one !== "");
  return said.length === 0 ? "" : ` Terms passed over: ${said.join(", ")}.`;
}

function LatticeTable({ lattice }: { readonly lattice: PlanLattice }) {
  return (
    <ResultTable<LatticePoint>
      caption="Lattice of orders, largest first, and what is left out when one stops there"
      rows={lattice.points.slice(0, MOST_ROWS)}
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
        { heading: "terms", show: (point) => <Terms point={point} /> },
        { heading: "size of each", numeric: true, show: ({ size }) => sizeText(size) },
        { heading: "left out", numeric: true, show: ({ leftOut }) => sizeText(leftOut) },
        { heading: "kept", show: ({ included }) => (included ? "kept" : "left out") },
      ]}
    />
  );
}

const MOST_ROWS = 60;
const MOST_TERMS = 3;

function Terms({ point: { terms, count } }: { readonly point: LatticePoint }) {
  const shown = terms.slice(0, MOST_TERMS);
  const others = count - shown.length;
  return (
    <span className="plan-entries">
      {shown.map((latex) => (
        <Formula key={latex} latex={latex} />
      ))}
      {others > 0 && (
        <span>
          {shown.length > 0 ? "and " : ""}
          {others} {others === 1 ? "product" : "products"}
        </span>
      )}
    </span>
  );
}

const moveWords: Readonly<Record<LatticeMove["what"], string>> = {
  "probe up": "p + σ",
  "probe down": "p − σ",
  "heavy up": "Λ + σ",
  "heavy down": "Λ − σ",
};

function Moves({ moves }: { readonly moves: readonly LatticeMove[] }) {
  if (moves.length === 0) return null;
  return (
    <ResultTable<LatticeMove>
      caption="The same cut when a scale moves"
      showCaption
      rows={moves}
      keyOf={({ what }) => what}
      columns={[
        { heading: "moved to", show: ({ what }) => moveWords[what] },
        {
          heading: "left out",
          numeric: true,
          show: ({ leftOut }) => (leftOut === null ? "–" : sizeText(leftOut)),
        },
        { heading: "target", show: ({ meetsTarget }) => (meetsTarget ? "met" : "missed") },
      ]}
    />
  );
}
