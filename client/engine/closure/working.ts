/** The derivation behind a closed set: what bounds the insertions, what each demands, and why it ends. */
import type { WorkingStep } from "../evaluation.ts";
import { bracketed } from "../divergence/formulas.ts";
import { LinearForm } from "../exact/linear-form.ts";
import { isRetarded } from "../divergence/retarded.ts";
import type { Theory } from "../premises/theory.ts";
import { isMissing, type ClosureValue, type DemandedOperator } from "./value.ts";

/** Written out one by one: the first that are missing, or where none is the first that are demanded. */
const MOST_SHOWN = 8;
/** Operators of one order written in a line. */
const MOST_NAMED = 8;

export function explainClosure(value: ClosureValue, theory: Theory): WorkingStep[] {
  const { caps, operators } = value;
  const missing = operators.filter(isMissing);
  const examples = (missing.length > 0 ? missing : operators).slice(0, MOST_SHOWN);
  const order = caps.order.latex;
  return [
    { step: "heading", text: "What bounds the insertions" },
    {
      step: "prose",
      text: "Let a graph have $V_i$ vertices of the kind $i$ with $n_i$ legs, $I$ internal lines, $E$ external legs and $L$ loops. Lines end at vertices and $L$ counts the momenta that stay free:",
    },
    {
      step: "formula",
      latex:
        "2I + E = \\sum_i V_i n_i,\\quad L = I - \\sum_i V_i + 1\\quad\\Rightarrow\\quad \\sum_i V_i\\,(n_i - 2) = 2(L - 1) + E",
    },
    {
      step: "prose",
      text: `With $L \\le ${caps.loops}$ and $E \\le ${caps.legs}$ the right side is at most $${2 * (caps.loops - 1) + caps.legs}$, which bounds every vertex with three or more legs, marginal and relevant ones too. Vertices of negative $[g_i]$ also cost $-[g_i]$ each in the order $n = \\sum_i V_i \\max(0, -[g_i]) \\le ${order}$. Masses and kinetic terms lower $\\omega$ or leave it, and change neither loops nor legs: they are not counted as insertions.`,
    },
    { step: "heading", text: "What a graph demands" },
    { step: "formula", latex: degreeLatex(theory) },
    {
      step: "prose",
      text: "Where $\\omega \\ge 0$ and a one-particle irreducible graph exists, the operators with these legs and $k \\le \\omega$ derivatives are demanded; the remainder $\\omega - k$ is made up by the coefficient. A part of a graph that hangs on one vertex and has no external leg sees no external momentum: then $k$ is at most the number of derivatives at the vertices.",
    },
    { step: "prose", text: regulatorText(value) },
    { step: "prose", text: graphText(theory) },
    ...selectionSteps(value),
    ...(examples.length === 0
      ? []
      : [
          {
            step: "heading",
            text: missing.length > 0 ? "What the premises lack" : "What is demanded",
          } as const,
          ...examples.flatMap((operator) => explainOperator(operator, value, theory)),
          ...operatorsLeft(missing.length > 0 ? missing.length : operators.length),
        ]),
    { step: "heading", text: "The closed set" },
    ...value.orders.map(({ order: at, enters }): WorkingStep => {
      const named = enters.slice(0, MOST_NAMED).map(({ latex }) => latex);
      const rest = enters.length > MOST_NAMED ? [`\\ldots\\ (${enters.length - MOST_NAMED})`] : [];
      return { step: "formula", latex: `n = ${at.latex}:\\quad ${[...named, ...rest].join(",\\;\\; ")}` };
    }),
    { step: "heading", text: "Why it ends" },
    { step: "prose", text: endText(value) },
  ];
}

function operatorsLeft(count: number): WorkingStep[] {
  return count > MOST_SHOWN
    ? [{ step: "prose", text: `The other ${count - MOST_SHOWN} follow in the same way.` }]
    : [];
}

function degreeLatex(theory: Theory): string {
  const legs = theory.fields
    .filter(({ weight }) => !weight.equals(LinearForm.zero))
    .map(({ weight, latex }) => {
      const factor = weight.toString() === "1" ? "" : `${bracketed(weight)}\\,`;
      return ` - ${factor}E_{${latex}}`;
    });
  return `\\omega = ${theory.measure.toLatex()}${legs.join("")} - \\sum_i V_i\\,[g_i]`;
}

function regulatorText({ regulator, massless }: ClosureValue): string {
  if (regulator === "cutoff")
    return "With a cutoff $\\Lambda_c$ the remainder is made up by powers of the cutoff, so operators of lower dimension are renormalised too: insertions of order $n$ with a remainder $r$ give $\\Lambda_c^{r}/\\Lambda^{n}$, and with $\\Lambda_c$ of the size of $\\Lambda$ the operator is demanded at order $n - r$, or at order $0$ when that is negative.";
  const conserved =
    "In dimensional regularisation with mass-independent subtraction a counterterm is a product of couplings and masses, so it has exactly the order $n$ of its insertions: the order in $1/\\Lambda$ is conserved.";
  return massless
    ? `${conserved} The theory is taken as massless: nothing makes up a remainder, and only $k = \\omega$ is demanded.`
    : `${conserved} That supposes every mass kept as a light parameter, as masses make up the remainder: by even powers, and by odd ones only where a spinor has a mass term, written or demanded, as chirality protects it.`;
}

/** Which graphs count, beside their degree. */
function graphText({ spacetime, fields }: Theory): string {
  const d = spacetime.geometry === "isotropic" ? spacetime.d.asRational() : null;
  const rules = [
    "Loops of parts that hang together at single vertices multiply, so each such part must have $\\omega \\ge 0$ by itself, or only subdivergences are left.",
    d && d.isInteger() && d.numerator % 2n !== 0n
      ? "In odd $d$ dimensional regularisation has poles at even loop order only, for each such part."
      : "",
    fields.some(isRetarded)
      ? "Retarded lines run forward in time: a graph in which they close on themselves vanishes, and where all lines are of Schrödinger fields an odd $D\\cdot L$ of such a part leaves no pole."
      : "",
  ];
  return rules.filter((rule) => rule !== "").join(" ");
}

function selectionSteps({ shift }: ClosureValue): WorkingStep[] {
  const shifted = shift.map(({ latex }) => `$${latex}$`).join(", ");
  const rule =
    "Derivatives and vector indices contract in pairs unless a gamma matrix or a velocity takes one, fermions come in pairs, and charges add up to zero.";
  return [
    {
      step: "prose",
      text:
        shift.length === 0
          ? rule
          : `${rule} The shift symmetry of ${shifted} asks for at least one derivative for each such leg and forbids masses of these fields; operators that are invariant only up to a total derivative are not looked for with fewer.`,
    },
  ];
}

function explainOperator(operator: DemandedOperator, value: ClosureValue, theory: Theory): WorkingStep[] {
  const { latex, vertices, loops, omega, remainder, order, insertionOrder } = operator;
  const insertions = vertices
    .map(({ count, latex: vertex }) => `${count === 1 ? "" : `${count} \\times `}\\left(${vertex}\\right)`)
    .join(",\\; ");
  const made =
    remainder.text === "0"
      ? ""
      : value.regulator === "cutoff"
        ? `,\\quad \\Lambda_c^{${remainder.latex}}/\\Lambda^{${insertionOrder.latex}}`
        : `,\\quad \\text{masses to the power } ${remainder.latex}`;
  return [
    {
      step: "formula",
      latex: `${latex}:\\quad ${insertions},\\quad L = ${loops},\\quad n = ${order.latex}`,
    },
    {
      step: "formula",
      latex: `\\omega = ${theory.measure.toLatex()} - ${legsWeight(operator, theory)}${vertices
        .map(({ count, coefficient }) => ` - ${count}\\cdot ${inBrackets(coefficient.latex)}`)
        .join("")} = ${omega.latex}${made}`,
    },
  ];
}

function inBrackets(latex: string): string {
  return latex.startsWith("-") ? `(${latex})` : latex;
}

/** "2\cdot 1 - 2\cdot \frac{3}{2}": count and weight of each field among the legs. */
function legsWeight({ legsOf }: DemandedOperator, theory: Theory): string {
  return legsOf
    .flatMap(({ fieldRowId, count }) => {
      const field = theory.fields.find(({ rowId }) => rowId === fieldRowId);
      return field ? [`${count}\\cdot ${bracketed(field.weight)}`] : [];
    })
    .join(" - ");
}

function endText({ rounds, verdict, caps, legsBeyond }: ClosureValue): string {
  const turns =
    rounds <= 1
      ? "One round of insertions sufficed"
      : `What is missing was inserted in turn, at the order at which it is demanded, ${rounds} rounds in all, until nothing new came`;
  const cut =
    legsBeyond === null
      ? "Operators up to this order have no more legs than were looked at"
      : `Operators with more than ${caps.legs} legs, up to ${legsBeyond}, were not looked at`;
  const order = `up to order $${caps.order.latex}$ and within these loops and legs`;
  const verdicts: Record<ClosureValue["verdict"], string> = {
    closed: `The premises hold every operator that is demanded: ${order} they are closed under renormalisation.`,
    "closed up to redundant operators": `All that the premises lack is redundant: integration by parts, equations of motion and redefinitions of fields turn it into other operators of the same order. Up to these, ${order}, they are closed under renormalisation.`,
    "not closed": `With what is missing added at these orders, the set is closed under renormalisation ${order}. In the premises a term counts at the order of its dimension; where that is lower than the order at which it was demanded, more may be demanded then.`,
  };
  return `${turns}. ${cut}. ${verdicts[verdict]}`;
}
