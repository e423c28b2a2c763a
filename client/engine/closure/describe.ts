/** The closed set as the block's value. */
import { lineStyle } from "../divergence/line-styles.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Closure } from "./close.ts";
import type { Demand } from "./look-for.ts";
import type { Frame } from "./frame.ts";
import { independenceOf } from "./independence.ts";
import { Structures } from "./structures.ts";
import { freeCouplings, termText } from "./term-text.ts";
import {
  isMissing,
  isNeeded,
  MOST_DRAWN,
  type ClosedOrder,
  type ClosureValue,
  type DemandedOperator,
} from "./value.ts";

export function describeClosure({ demands, rounds }: Closure, frame: Frame): ClosureValue {
  const { theory, settings, units } = frame;
  const sorted = [...demands].sort(
    (a, b) =>
      a.order - b.order ||
      b.candidate.coefficient - a.candidate.coefficient ||
      a.target.total - b.target.total,
  );
  const structures = new Structures(
    theory,
    Math.max(0, ...demands.map(({ candidate }) => candidate.counterterm.derivatives)),
  );
  const coupling = freeCouplings(theory);
  const operators = sorted.map((demand, index) => describeDemand(demand, index, frame, structures, coupling));
  const missing = operators.filter(isMissing);
  const needed = missing.filter(isNeeded);
  return {
    regulator: settings.cutoff ? "cutoff" : "dimensional regularisation",
    massless: settings.massless,
    shift: theory.fields.flatMap(({ rowId, latex }, f) =>
      settings.shift[f] ? [{ fieldRowId: rowId, latex }] : [],
    ),
    caps: { order: shown(settings.order), loops: settings.loops, legs: frame.mostLegs },
    legsBeyond: frame.legsBeyond,
    verdict:
      missing.length === 0
        ? "closed"
        : needed.length === 0
          ? "closed up to redundant operators"
          : "not closed",
    missing: missing.length,
    missingNotRedundant: needed.length,
    firstMissing: needed[0]?.order ?? null,
    orders: ordersOf(operators, frame),
    operators,
    rounds,
    fields: theory.fields.map((field, f) => ({
      symbol: field.symbol,
      latex: field.latex,
      style: lineStyle(field, f, theory),
      directed: !field.selfConjugate,
    })),
  };

  function ordersOf(all: readonly DemandedOperator[], { insertions }: Frame): ClosedOrder[] {
    const own = theory.terms.flatMap((term) => {
      if (term.kinetic || (settings.useSymmetries && !term.allowed)) return [];
      const order = insertions.find(({ termRowId }) => termRowId === term.rowId)?.order ?? 0;
      return order > frame.mostOrder ? [] : [{ latex: term.latex, order: units.exact(order) }];
    });
    const texts = new Map(
      [...own.map(({ order }) => order), ...all.map(({ order }) => Rational.parse(order.text))].flatMap(
        (order) => (order ? [[order.toString(), order] as const] : []),
      ),
    );
    let size = 0;
    return [...texts.values()]
      .sort((a, b) => a.compare(b))
      .map((order) => {
        const here = all.filter((operator) => operator.order.text === order.toString());
        const enters = [
          ...own.filter((term) => term.order.equals(order)).map(({ latex }) => ({ latex, isNew: false })),
          ...here.filter(isMissing).map(({ latex }) => ({ latex, isNew: true })),
        ];
        size += enters.length;
        return {
          order: shown(order),
          demanded: here.length,
          missing: here.filter(isMissing).length,
          size,
          enters,
        };
      });
  }
}

function describeDemand(
  { target, candidate, order, set, loops, omega, witness }: Demand,
  index: number,
  { theory, settings, units }: Frame,
  structures: Structures,
  coupling: () => string,
): DemandedOperator {
  const { counterterm } = candidate;
  const { latex, text, derivatives, timeDerivatives, dimension, presentAs, kinetic, gauge } = counterterm;
  const missing = isMissing({ presentAs, supposed: kinetic });
  return {
    key: candidate.key,
    latex,
    text,
    legs: target.total,
    legsOf: target.described.fields.map(({ fieldRowId, count, conjugateCount }) => ({
      fieldRowId,
      count: count + conjugateCount,
    })),
    derivatives,
    timeDerivatives,
    dimension,
    order: shown(units.exact(order)),
    insertionOrder: shown(units.exact(set.order)),
    omega: shown(units.exact(omega)),
    remainder: shown(units.exact(omega - candidate.weight)),
    loops,
    vertices: set.parts.map(({ insertion, count }) => ({
      termRowId: insertion.termRowId,
      latex: insertion.latex,
      coefficient: shown(units.exact(insertion.coefficient)),
      count,
    })),
    graph: index < MOST_DRAWN ? witness.graph : null,
    kinds: witness.kinds,
    presentAs,
    supposed: kinetic,
    gauge: gauge === "none" ? "none" : "restricted",
    ...independenceOf(target, candidate, theory, settings.shift, structures),
    term: missing ? termText(coupling(), counterterm, target.legs, theory) : "",
  };
}
