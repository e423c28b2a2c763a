/** The scaling argument, term by term, in the notebook's own symbols. */
import type { WorkingStep } from "../evaluation.ts";
import { measuredLatex } from "../notation/measured.ts";
import { coefficientLatex, operatorLatex } from "../notation/operator-latex.ts";
import { shown } from "../notation/quantity.ts";
import { ESTIMATE_DIGITS } from "../premises/present-measured.ts";
import { dimensionLatex } from "../premises/working.ts";
import type { Term, Theory } from "../premises/theory.ts";
import type { Size } from "./sizes.ts";
import type { ScalingRow, ScalingValue } from "./value.ts";
import { ratioLatex } from "./sizes.ts";
import type { WithRunning } from "./with-running.ts";
import type { WorkingPoint } from "./working-point.ts";
import { LinearForm } from "../exact/linear-form.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

export interface WorkedRow {
  readonly term: Term;
  readonly row: ScalingRow;
  readonly size: Size;
}

export function scalingWorking(
  theory: Theory,
  rows: readonly WorkedRow[],
  point: WorkingPoint,
  value: Pick<ScalingValue, "counting" | "freeDimension" | "meaningOfHeavy">,
  ran: Pick<WithRunning, "steps" | "anomalous">,
): WorkingStep[] {
  const measure = theory.spacetime.geometry === "isotropic" ? "d" : "D + z";
  const time = theory.spacetime.geometry === "isotropic" ? "" : ", $t = s^{z}t'$";
  return [
    heading("Rescaling"),
    prose(
      `Put $x = s\\,x'$${time} with the primed coordinates fixed, and rescale the fields so that their kinetic terms keep their form. The coefficient of an operator of dimension $\\Delta$ then picks up $s^{${measure} - \\Delta}$: toward low energy ($s \\to \\infty$) it grows if the exponent is positive (relevant), stays if it is zero (marginal) and fades if it is negative (irrelevant).`,
    ),
    ...ran.steps,
    ...termSteps(theory, rows, value.freeDimension, ran.anomalous),
    ...sizeSteps(rows, point, value, theory.spacetime.geometry === "isotropic" ? "d" : "D - z"),
  ];
}

/** Theories never change, and every Scaling block of a notebook derives the same steps from its own. */
const knownSteps = new WeakMap<Theory, readonly WorkingStep[]>();

/** The part of the derivation that no input of the block enters: it follows from the premises alone. */
function termSteps(
  theory: Theory,
  rows: readonly WorkedRow[],
  free: ScalingValue["freeDimension"],
  anomalous: WithRunning["anomalous"],
): readonly WorkingStep[] {
  const split = rows.some(({ row }) => row.marginally !== null);
  const known = split ? undefined : knownSteps.get(theory);
  const steps = known ?? rows.flatMap((worked) => deriveTerm(worked, theory, free, anomalous));
  if (!split) knownSteps.set(theory, steps);
  return steps;
}

function deriveTerm(
  { term, row }: WorkedRow,
  theory: Theory,
  free: string | null,
  anomalous: WithRunning["anomalous"],
): WorkingStep[] {
  const operator = operatorLatex(term.monomial, theory.fields, theory.spacetime.geometry);
  const coefficient = coefficientLatex(term.monomial);
  const measure = theory.spacetime.geometry === "isotropic" ? "d" : "D + z";
  const bare = coefficient === "1" ? "\\text{coefficient}" : coefficient;
  const exponent = term.coefficient.toLatex();
  const numbers = theory.measure.asRational()
    ? ` = ${theory.measure.toLatex()} - ${parenthesised(term.dimension)}`
    : "";
  const zero =
    row.marginalAt === null || free === null
      ? ""
      : `,\\qquad 0 \\text{ at } ${free} = ${fraction(row.marginalAt)}`;
  return [
    prose(`$${term.latex}$`),
    formula(
      row.dimensionFrom === "fixed point"
        ? `\\Delta\\!\\left(${operator}\\right) = ${anomalous.get(row.rowId) ?? term.dimension.toLatex()}`
        : dimensionLatex(term, theory).replace(/,\\qquad.*$/, ""),
    ),
    formula(
      `\\left[${bare}\\right] = ${measure} - \\left[${operator}\\right]${numbers} = ${exponent}${zero}`,
    ),
    prose(classSentence(row, free)),
  ];
}

function parenthesised(form: LinearForm): string {
  const text = form.toLatex();
  return text.startsWith("-") || text.includes(" ") ? `(${text})` : text;
}
function fraction(text: string): string {
  const [over = "", under] = text.split("/");
  return under === undefined ? over : `\\frac{${over}}{${under}}`;
}

function classSentence(
  { scalingClass, marginally, ranges, kinetic }: ScalingRow,
  free: string | null,
): string {
  if (kinetic)
    return "This is a kinetic term: it fixes the dimension of its field, so it is marginal by construction.";
  if (marginally) return `It is ${marginally}.`;
  if (scalingClass) return `It is ${scalingClass}.`;
  const [below, above] = ranges;
  if (!below || !above || free === null) return "Its class depends on the dimensions left symbolic.";
  return `It is ${below.scalingClass} below $${free} = ${fraction(below.to ?? "")}$, marginal there, and ${above.scalingClass} above.`;
}

function sizeSteps(
  rows: readonly WorkedRow[],
  point: WorkingPoint,
  value: Pick<ScalingValue, "counting" | "meaningOfHeavy">,
  measure: string,
): WorkingStep[] {
  const sized = rows.filter(({ size }) => size.quantity);
  if (sized.length === 0) return [];
  const q = ratioLatex(point, LinearForm.constant(1));
  const heavy = point.heavy?.latex ?? "\\Lambda";
  const expansion = point.expansion && shown(point.expansion);
  return [
    heading("Sizes"),
    prose(
      value.counting === "natural size"
        ? `A coefficient of natural size is $\\hat g$ times the power of the heavy scale that its dimension asks for, so at the probe scale the term has size $\\hat g\\,(${q})^{\\Delta - ${measure}}$ relative to the kinetic terms.`
        : `Naive dimensional analysis (Gavela, Jenkins, Manohar and Merlo 2016) gives every field $4\\pi$ beyond the kinetic terms' two, every gauge or Yukawa coupling $1/4\\pi$, every quartic coupling $1/16\\pi^2$ and every light mass $1/${heavy}$; as before, every leg and derivative counts its dimension in powers of the probe scale. Numerical factors in the terms are not counted.`,
    ),
    ...(expansion ? [formula(`Q = ${q} = ${measuredLatex(expansion.value, expansion.sigma, "")}`)] : []),
    ...(value.meaningOfHeavy === "" ? [] : [prose(value.meaningOfHeavy)]),
    ...sized
      .filter(({ term }) => !term.kinetic)
      .map(({ term, size }) => {
        const number = size.quantity ? shown(size.quantity) : { value: NaN, sigma: 0 };
        const shownValue = measuredLatex(number.value, number.sigma, "", ESTIMATE_DIGITS);
        const middle = size.from === "assigned" ? "" : size.latex === shownValue ? "" : ` = ${size.latex}`;
        const said = size.from === "assigned" ? "\\quad\\text{(assigned)}" : "";
        return formula(`\\text{size of }${term.latex}${middle} = ${shownValue}${said}`);
      }),
  ];
}
