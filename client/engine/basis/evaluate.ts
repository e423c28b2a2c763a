/** Evaluates a Basis count: reads the content, looks how much there is to do, counts, and adds up by dimension. */
import type { Evaluation, Notice, Problem, Scalar } from "../evaluation.ts";
import { Rational } from "../exact/rational.ts";
import type { EvaluationContext } from "../kind.ts";
import type { Theory } from "../premises/theory.ts";
import { anomaliesOf } from "./anomalies.ts";
import type { Content } from "./content.ts";
import { countOperators, type CountedClass } from "./count.ts";
import { FlavourPolynomial } from "./flavour-polynomial.ts";
import { patienceChoices, type BasisInputs } from "./inputs.ts";
import { readContent } from "./read-content.ts";
import { largestScalarDimension } from "./scalar-integral.ts";
import type { BasisValue, ClassCount, CountText, DimensionCount } from "./value.ts";
import { amountOfWork, MOST_CLASSES_COUNTED } from "./work.ts";
import { basisWorking } from "./working.ts";

/** What takes longer is asked about first. */
const SECONDS_AT_ONCE = 5;
/** Shown and stored one by one; all are in the totals. */
const MOST_CLASSES = 4_000;
const LARGEST_DIMENSION = 30;

interface Range {
  /** Twice the mass dimension. */
  readonly least: number;
  readonly most: number;
}

/**
 * Problems: those of groups and fields, `counted-dimension-unreadable`, `range-unreadable`, `below-complete`,
 * `range-too-high`, `range-reversed`, `flavours-at-unreadable`, `parity-needs-scalars`, `nothing-to-count`,
 * `count-takes-long`, `count-too-large`.
 */
export function evaluateBasis(
  inputs: BasisInputs,
  _theory: Theory | null,
  context: EvaluationContext,
): Evaluation<BasisValue> {
  const problems: Problem[] = [];
  const d = readDimension(inputs.d, problems);
  const range = d === null ? null : readRange(inputs, d, problems);
  const flavours = readFlavoursAt(inputs.flavours, problems);
  if (d === null || range === null || flavours === null) return refused(problems);
  const content = readContent(inputs, d, problems);
  // Without a group or a field that cannot be read this would be the count of another theory.
  if (problems.length > 0) return refused(problems);
  if (content.quanta.length === 0)
    return refused([{ code: "nothing-to-count", path: ["fields"], facts: {} }]);
  if (content.withParity && content.quanta.some(({ spin }) => spin !== "scalar"))
    return refused([{ code: "parity-needs-scalars", path: ["parity"], facts: {} }]);
  const work = amountOfWork(content, range.most);
  if (work.isTooMuch)
    return refused([{ code: "count-too-large", path: ["to"], facts: { most: MOST_CLASSES_COUNTED } }]);
  if (work.seconds > SECONDS_AT_ONCE && inputs.patience === patienceChoices[0]) {
    const minutes = Math.max(1, Math.round(work.seconds / 60));
    return refused([
      { code: "count-takes-long", path: ["patience"], facts: { classes: work.classes.length, minutes } },
    ]);
  }
  const counted = countOperators(content, work.classes, range.least, range.most, context.tell);
  const value = present(content, counted, range, flavours);
  return {
    value,
    problems,
    notices: noticesOf(content, value),
    scalars: scalarsOf(value),
    working: basisWorking(content, value),
  };
}

function refused(problems: readonly Problem[]): Evaluation<BasisValue> {
  return { value: null, problems, notices: [], scalars: [], working: [] };
}

function readDimension(text: string, problems: Problem[]): number | null {
  const d = Number(text.trim());
  if (text.trim() !== "" && Number.isInteger(d) && d >= 3 && d <= largestScalarDimension) return d;
  problems.push({
    code: "counted-dimension-unreadable",
    path: ["d"],
    facts: { text, most: largestScalarDimension },
  });
  return null;
}

function readRange(inputs: BasisInputs, d: number, problems: Problem[]): Range | null {
  const [least, most] = (["from", "to"] as const).map((field) => {
    const value = Rational.parse(inputs[field].trim());
    const doubled = value?.times(Rational.of(2));
    if (!doubled?.isInteger() || doubled.sign() <= 0) {
      problems.push({ code: "range-unreadable", path: [field], facts: { text: inputs[field] } });
      return null;
    }
    return doubled.toFloat();
  });
  if (least === null || most === null || least === undefined || most === undefined) return null;
  const refuse = (field: string, code: string, facts: Problem["facts"]) => {
    problems.push({ code, path: [field], facts });
    return null;
  };
  if (least <= 2 * d) return refuse("from", "below-complete", { d });
  if (most < least) return refuse("to", "range-reversed", {});
  if (most > 2 * LARGEST_DIMENSION) return refuse("to", "range-too-high", { most: LARGEST_DIMENSION });
  return { least, most };
}

function readFlavoursAt(text: string, problems: Problem[]): number | null {
  const flavours = Number(text.trim());
  if (text.trim() !== "" && Number.isInteger(flavours) && flavours >= 0 && flavours <= 1000) return flavours;
  problems.push({ code: "flavours-at-unreadable", path: ["flavours"], facts: { text } });
  return null;
}

function present(
  content: Content,
  counted: readonly CountedClass[],
  range: Range,
  flavours: number,
): BasisValue {
  const show = (number: FlavourPolynomial): CountText => ({
    text: number.toString(),
    latex: number.toLatex(),
    at: number.at(flavours).toString(),
  });
  const sums = new Map<number, { total: FlavourPolynomial; classes: number }>();
  const classes: { readonly doubled: number; readonly fields: number; readonly row: () => ClassCount }[] = [];
  for (const found of counted) {
    const fields = found.powers.reduce((a, b) => a + b, 0);
    for (const { derivatives, number } of found.numbers) {
      const doubled = found.doubled + 2 * derivatives;
      const before = sums.get(doubled) ?? { total: FlavourPolynomial.zero, classes: 0 };
      const all = number.times(found.counts);
      sums.set(doubled, { total: before.total.plus(all), classes: before.classes + 1 });
      // Of a long count most are never shown, and writing them all would take longer than counting them.
      const row = () => ({
        id: `${found.powers.join("-")}d${derivatives}`,
        dimension: halfOf(doubled),
        fieldsLatex: fieldsLatex(content, found.powers),
        fields,
        derivatives,
        number: show(all),
        withConjugate: found.counts === 2,
      });
      classes.push({ doubled, fields, row });
    }
  }
  classes.sort((a, b) => a.doubled - b.doubled || a.fields - b.fields);
  const totals: DimensionCount[] = [];
  // In even d only whole dimensions occur, and a dimension without operators is worth knowing.
  const step = content.d % 2 === 0 ? 2 : 1;
  for (
    let doubled = range.least + (step === 2 ? range.least % 2 : 0);
    doubled <= range.most;
    doubled += step
  ) {
    const sum = sums.get(doubled);
    totals.push({
      dimension: halfOf(doubled),
      total: show(sum?.total ?? FlavourPolynomial.zero),
      classes: sum?.classes ?? 0,
    });
  }
  return {
    d: content.d,
    withParity: content.withParity,
    symbolic: content.quanta.some((quantum) => quantum.flavours === "symbolic"),
    flavours,
    totals,
    classes: classes.slice(0, MOST_CLASSES).map(({ row }) => row()),
    classesLeftOut: Math.max(0, classes.length - MOST_CLASSES),
    content: content.quanta.map((quantum) => ({
      latex: quantum.latex,
      kind: quantum.pseudoscalar ? "pseudoscalar" : quantum.spin,
      charges: [
        ...quantum.representations.map(({ latex }) => latex),
        ...quantum.vectors.map((vector) => (vector ? "\\text{vector}" : "1")),
        ...quantum.charges.map((charge) => charge.toLatex()),
      ].join(",\\,"),
    })),
  };
}

function halfOf(doubled: number): string {
  return Rational.of(doubled, 2).toString();
}

function fieldsLatex({ quanta }: Content, powers: readonly number[]): string {
  return powers
    .flatMap((power, index) => {
      const latex = quanta[index]?.latex ?? "";
      if (power === 0) return [];
      if (power === 1) return [latex];
      return [/[_^]/.test(latex) ? `(${latex})^{${power}}` : `${latex}^{${power}}`];
    })
    .join("\\,");
}

function noticesOf(content: Content, value: BasisValue): Notice[] {
  const anomalies = anomaliesOf(content);
  return [
    ...(anomalies.length === 0
      ? []
      : [
          {
            code: "anomalous-content",
            path: ["fields"],
            facts: {
              anomalies: anomalies.map(({ name, coefficient }) => `${name}: ${coefficient}`).join(", "),
            },
          },
        ]),
    ...(value.totals.every(({ classes }) => classes === 0)
      ? [{ code: "everything-vanishes", path: ["fields"], facts: {} }]
      : []),
    { code: "count-is-of-real-parameters", path: [], facts: {} },
  ];
}

function scalarsOf(value: BasisValue): Scalar[] {
  const at = value.symbolic ? ` for $n_f = ${value.flavours}$` : "";
  return value.totals.flatMap(({ dimension, total }) => [
    {
      id: `total/${dimension}`,
      label: `operators of dimension ${dimension}${at}`,
      value: { type: "exact" as const, text: total.at },
    },
  ]);
}
