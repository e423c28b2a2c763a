/** The whole theory: which amplitudes diverge, what they need, and what that makes of the theory. */
import type { Evaluation, Notice, Problem, Scalar } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import { LinearForm } from "../exact/linear-form.ts";
import type { Theory } from "../premises/theory.ts";
import { incompletePremises } from "../premises/incomplete.ts";
import { amplitudeOf, legChoices, type Caps } from "./amplitudes.ts";
import { symmetryCautions } from "./cautions.ts";
import { legsThat } from "./contraction.ts";
import { countOf, noHalfEdges, type HalfEdges } from "./half-edges.ts";
import type { DivergenceInputs } from "./inputs.ts";
import { renormalisability } from "./theory-verdict.ts";
import type { Amplitude, Counterterm, TheoryDivergence } from "./value.ts";
import { indexSets, interactionTerms, interactionsOf, vertexSets } from "./vertex-sets.ts";
import { explainTheory } from "./working-theory.ts";

const MOST_LOOPS = 6;
const MOST_LEGS = 12;
const MOST_ORDER = 12;
/** Past these a listing would take seconds: lower caps are asked for instead. */
const MOST_VERTEX_SETS = 6_000;
const MOST_LEG_CHOICES = 6_000;

export function evaluateTheory(inputs: DivergenceInputs, theory: Theory): Evaluation<TheoryDivergence> {
  const refuse = (problems: Problem[]): Evaluation<TheoryDivergence> => ({
    value: null,
    problems,
    notices: [],
    scalars: [],
    working: [],
  });
  const problems: Problem[] = [];
  const caps = readCaps(inputs, problems);
  if (problems.length > 0) return refuse(problems);
  const listed = listAmplitudes(theory, caps, inputs.symmetries === "yes");
  if (listed === "too many")
    return refuse([
      {
        code: "theory-too-large",
        path: ["maxLoops"],
        facts: { loops: caps.loops, legs: caps.legs, order: caps.order.toString() },
      },
    ]);
  const value: TheoryDivergence = {
    mode: "whole theory",
    ...renormalisability(theory),
    couplings: interactionTerms(theory).map(({ term }) => ({
      termRowId: term.rowId,
      latex: term.latex,
      coefficient: shown(term.ultravioletCoefficient),
    })),
    amplitudes: listed ?? [],
    missing: missingFrom(listed ?? []),
    bounds: boundsOf(theory, listed ?? []),
    caps: { loops: caps.loops, legs: caps.legs, order: shown(caps.order) },
  };
  return {
    value,
    problems: [],
    notices: [...incompletePremises(theory), ...noticesOf(value, theory, listed === null)],
    scalars: scalarsOf(value),
    working: explainTheory(value, theory),
  };
}

function readCaps(inputs: DivergenceInputs, problems: Problem[]): Caps {
  const whole = (field: "maxLoops" | "maxLegs", initial: number, most: number): number => {
    const typed = inputs[field].trim();
    if (typed === "") return initial;
    const value = /^\d{1,4}$/.test(typed) ? Number(typed) : -1;
    if (value < 1 || value > most)
      problems.push({ code: "cap-unreadable", path: [field], facts: { text: typed, most } });
    return value;
  };
  const loops = whole("maxLoops", 2, MOST_LOOPS);
  const legs = whole("maxLegs", 6, MOST_LEGS);
  const typed = inputs.maxOrder.trim();
  const order = typed === "" ? Rational.of(2) : Rational.parse(typed);
  const fits = order !== null && order.sign() >= 0 && order.compare(Rational.of(MOST_ORDER)) <= 0;
  if (!fits)
    problems.push({ code: "cap-unreadable", path: ["maxOrder"], facts: { text: typed, most: MOST_ORDER } });
  return { loops, legs, order: fits ? order : Rational.zero };
}

/** @returns null when a dimension is symbolic: then no amplitude is divergent or not. */
function listAmplitudes(theory: Theory, caps: Caps, useSymmetries: boolean): Amplitude[] | null | "too many" {
  const interactions = interactionsOf(theory);
  const isNumber = (form: LinearForm) => form.asRational() !== null;
  if (!interactions || !isNumber(theory.measure) || !theory.fields.every(({ weight }) => isNumber(weight)))
    return null;
  const sets = vertexSets(
    interactions,
    theory,
    { surplus: 2 * (caps.loops - 1) + caps.legs, order: caps.order },
    MOST_VERTEX_SETS,
  );
  const interacts = (field: number) => interactions.some(({ edges }) => countOf(edges, field) > 0);
  const choices = legChoices(theory, caps.legs, MOST_LEG_CHOICES, interacts);
  if (!sets || !choices) return "too many";
  const index = indexSets(sets);
  const found = choices.flatMap((legs) => amplitudeOf(legs, index, caps, theory, useSymmetries) ?? []);
  const rank = ({ status }: Amplitude) => (status === "divergent" ? 0 : 1);
  return found.sort((a, b) => rank(a) - rank(b) || a.legs.total - b.legs.total);
}

/**
 * Each operator once, by rising order: not the vacuum energy or a field renormalisation, and nothing that symmetry or
 * gauge invariance excludes.
 */
function missingFrom(amplitudes: readonly Amplitude[]): Counterterm[] {
  const wanted = amplitudes
    .filter(({ legs }) => legs.total > 0)
    .flatMap(({ counterterms }) => counterterms)
    .filter(
      ({ presentAs, allowed, gauge, kinetic }) =>
        presentAs === null && allowed && !kinetic && gauge !== "excluded",
    );
  const orderOf = ({ order }: Counterterm) => Rational.parse(order.text) ?? Rational.zero;
  return wanted.sort((a, b) => orderOf(a).compare(orderOf(b)));
}

/** One line for each order in 1/Λ that graphs within the caps reach. */
function boundsOf(theory: Theory, amplitudes: readonly Amplitude[]): TheoryDivergence["bounds"] {
  const orders = new Map(
    amplitudes
      .flatMap(({ atOrders }) => atOrders)
      .map(({ order }) => [order.text, Rational.parse(order.text) ?? Rational.zero]),
  );
  return [...orders.values()]
    .sort((a, b) => a.compare(b))
    .map((order) => ({
      order: shown(order),
      largestDimension: shown(theory.measure.plus(LinearForm.constant(order))),
    }));
}

function noticesOf(value: TheoryDivergence, theory: Theory, isSymbolic: boolean): Notice[] {
  const notice = (code: string): Notice => ({ code, path: [], facts: {} });
  if (isSymbolic) return [notice("amplitudes-need-numbers")];
  const divergent = value.amplitudes.filter(({ status }) => status === "divergent");
  return [
    ...(divergent.length > 0 ? [notice("omega-not-sufficient")] : []),
    ...symmetryCautions(legsTogether(divergent, theory), theory).filter(
      ({ code }) => code !== "omega-shift" || scalarsAreDifferentiated(theory),
    ),
    ...(value.missing.length > 0 ? [notice("theory-not-closed")] : []),
  ];
}

/** One leg of every field that some of the amplitudes have. */
function legsTogether(amplitudes: readonly Amplitude[], theory: Theory): HalfEdges {
  const rowIds = new Set(amplitudes.flatMap(({ legs }) => legs.fields.map(({ fieldRowId }) => fieldRowId)));
  return { ...noHalfEdges(theory), plain: theory.fields.map(({ rowId }) => (rowIds.has(rowId) ? 1 : 0)) };
}

/** Only where every interaction of scalars has derivatives can a shift symmetry be meant. */
function scalarsAreDifferentiated(theory: Theory): boolean {
  const isScalar = ({ kind }: Theory["fields"][number]) =>
    kind === "real scalar" || kind === "complex scalar";
  return interactionTerms(theory).every(
    ({ term, edges }) =>
      legsThat(edges, theory, isScalar) === 0 || !term.derivativeWeight.equals(LinearForm.zero),
  );
}

function scalarsOf(value: TheoryDivergence): Scalar[] {
  const divergent = value.amplitudes.filter(({ status }) => status === "divergent");
  const verdict: Scalar[] = value.verdict
    ? [
        {
          id: "verdict",
          label: "renormalisability by power counting",
          value: { type: "word", text: value.verdict },
        },
      ]
    : [];
  return [
    ...verdict,
    {
      id: "divergent",
      label: "divergent amplitudes within the caps",
      value: { type: "exact", text: String(divergent.length) },
    },
    ...divergent.map(({ legs, omega }): Scalar => ({
      id: `${legs.key}/omega`,
      label: `largest degree of divergence within the caps of ${legs.latex === "1" ? "the vacuum" : `$${legs.latex}$`}`,
      value: { type: "exact", text: omega.text },
    })),
  ];
}
