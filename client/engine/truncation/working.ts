/** The derivation behind a truncation estimate, with this block's numbers filled in. */
import type { WorkingStep } from "../evaluation.ts";
import { floatText } from "../notation/float-text.ts";
import { unitText } from "../notation/unit-text.ts";
import type { Series } from "./series.ts";
import { uniformPriorFactor } from "./estimates.ts";
import type { Method, Omitted, TruncationInputs } from "./shape.ts";
import { describeAlong, describeSets } from "./working-curve.ts";
import type { Band, OrderEstimate, TruncationValue } from "./value.ts";

const heading = (text: string): WorkingStep => ({ step: "heading", text });
const prose = (text: string): WorkingStep => ({ step: "prose", text });
const formula = (latex: string): WorkingStep => ({ step: "formula", latex });

/** A float in LaTeX with five digits, or with its uncertainty. */
function shown(value: number, sigma = 0): string {
  return floatText(value, sigma, { digits: sigma > 0 ? null : 5, style: "auto", markup: "latex" });
}
/** A value of X with its unit. */
function measured(value: number, unit: string): string {
  return unit === "" ? shown(value) : shown(value) + unitText(unit, "latex");
}

export function describeWorking(
  value: TruncationValue,
  series: Series,
  inputs: TruncationInputs,
): WorkingStep[] {
  const last = value.orders.at(-1);
  if (!last) return [];
  return [
    ...describeExpansion(value, series),
    ...describeConjugate(value, series, last),
    ...describeUniform(value, last),
    ...(value.sets ? [...describeSets(value.sets), ...describeSetResults(value, last)] : []),
    ...describeFirstOmitted(value, last),
    ...describeDifferences(value, series, last),
    ...describeRescaling(value, last),
    ...(value.curve ? describeAlong(value.curve, inputs) : []),
    ...describeAssumptions(),
  ];
}

function describeExpansion(value: TruncationValue, series: Series): WorkingStep[] {
  const { q, reference } = value;
  const name = q.latex === "Q" ? "Q" : `Q = ${q.latex}`;
  const steps = [
    heading("Coefficients"),
    formula(
      `X = X_{\\mathrm{ref}} \\sum_n c_n Q^n, \\qquad ${name} = ${shown(q.value, q.sigma)}, \\qquad X_{\\mathrm{ref}} = ${measured(reference, value.unit)}`,
    ),
  ];
  let previous: (typeof series.known)[number] | null = null;
  for (const known of series.known) {
    const coefficient = value.coefficients.find(({ order }) => order === known.order)?.value ?? 0;
    const shift = previous ? `X^{(${known.order})} - X^{(${previous.order})}` : `X^{(${known.order})}`;
    steps.push(
      formula(
        `c_{${known.order}} = \\frac{${shift}}{X_{\\mathrm{ref}}\\, Q^{${known.order}}} = ${shown(coefficient)}`,
      ),
    );
    previous = known;
  }
  const used = value.coefficients
    .filter((coefficient) => coefficient.used)
    .map(({ order }) => `$c_{${order}}$`);
  const absent = value.coefficients
    .filter((coefficient) => coefficient.value === null)
    .map(({ order }) => order);
  steps.push(prose(used.length === 0 ? "No coefficient is used." : `Used: ${used.join(", ")}.`));
  if (series.reference === null) {
    steps.push(
      prose(
        "The leading coefficient is 1 by construction, since $X_{\\mathrm{ref}}$ is made from the lowest order: it carries no information and is not counted.",
      ),
    );
  }
  if (absent.length > 0) {
    steps.push(
      prose(
        `Absent by symmetry: order ${absent.join(", ")}. An absent order is no coefficient of 0; it adds nothing to the number of coefficients.`,
      ),
    );
  }
  return steps;
}

function find(at: OrderEstimate, method: Method, omitted: Omitted, degree: string | null): Band | undefined {
  return at.bands.find(
    (band) => band.method === method && band.omitted === omitted && band.degree === degree,
  );
}
/** "± 0.045 pb", with what the uncertainty of Q does to it. */
function result(band: Band, unit: string): string {
  const moves = band.fromQ > 0 ? `\\quad (\\pm ${measured(band.fromQ, unit)} \\text{ from } Q)` : "";
  return `${measured(band.halfWidth, unit)}${moves}`;
}

function describeConjugate(value: TruncationValue, series: Series, last: OrderEstimate): WorkingStep[] {
  const { posterior } = last;
  if (!posterior) return [];
  const steps = [
    heading("Conjugate prior"),
    prose(
      "Each $c_n$ is Gaussian with width $\\bar c$; $\\bar c^2$ has a scaled inverse $\\chi^2$ prior with $\\nu_0$ and $\\tau_0^2$ (Melendez et al. 2019).",
    ),
    formula(
      `\\nu = \\nu_0 + n_c = ${series.nu0} + ${last.coefficientCount} = ${posterior.nu}, \\qquad \\tau^2 = \\frac{\\nu_0\\tau_0^2 + \\sum c_n^2}{\\nu} = ${shown(posterior.tau2)}`,
    ),
  ];
  for (const omitted of ["all omitted orders", "first omitted term"] as const) {
    const sum = omitted === "all omitted orders" ? "\\sum_{n} Q^{2n}" : `Q^{${2 * last.nextOrder}}`;
    for (const degree of value.degrees) {
      const band = find(last, "conjugate prior", omitted, degree.text);
      if (!band) continue;
      const quantile = series.quantiles(degree.probability, posterior.nu);
      steps.push(
        formula(
          `t_{${degree.text}\\%} \\, |X_{\\mathrm{ref}}| \\, \\tau \\sqrt{${sum}} = ${shown(quantile)} \\cdot ${shown(band.halfWidth / quantile)} = ${result(band, value.unit)}`,
        ),
      );
    }
  }
  steps.push(
    prose(
      `The sum runs over the orders $n \\ge ${last.nextOrder}$ that exist, $Q^{${2 * last.nextOrder}}/(1-Q^2)$ when all do. The scale of a Student-t is not its 68 % half-width; 68 % means 0.68, one standard deviation of a Gaussian is 0.6827.`,
    ),
  );
  return steps;
}

function describeUniform(value: TruncationValue, last: OrderEstimate): WorkingStep[] {
  if (last.largest === null) return [];
  const count = last.coefficientCount;
  const steps = [
    heading("Uniform prior"),
    prose(
      `$c_n$ uniform in $|c_n| \\le \\bar c$, $\\ln\\bar c$ uniform without limits, first omitted term only (Cacciari, Houdeau 2011). With $n_c = ${count}$ the factor is $p\\,(n_c+1)/n_c$ up to $p = n_c/(n_c+1)$ and $[(n_c+1)(1-p)]^{-1/n_c}$ above.`,
    ),
  ];
  for (const degree of value.degrees) {
    const band = find(last, "uniform prior", "first omitted term", degree.text);
    if (!band) continue;
    steps.push(
      formula(
        `${degree.text}\\%:\\quad |X_{\\mathrm{ref}}| \\, \\bar c \\, Q^{${last.nextOrder}} \\cdot ${shown(uniformPriorFactor(count, degree.probability))} = ${result(band, value.unit)}`,
      ),
    );
  }
  return steps;
}

function describeSetResults(value: TruncationValue, last: OrderEstimate): WorkingStep[] {
  return last.bands
    .filter(({ method }) => method.startsWith("prior set"))
    .map((band) =>
      formula(
        `\\text{${band.method.slice("prior ".length)}, ${band.omitted}, ${band.degree ?? ""}\\%}:\\quad ${result(band, value.unit)}`,
      ),
    );
}

function describeFirstOmitted(value: TruncationValue, last: OrderEstimate): WorkingStep[] {
  const band = find(last, "first omitted term", "first omitted term", null);
  if (!band || last.largest === null) return [];
  const steps = [
    heading("First omitted term"),
    formula(
      `\\bar c = \\max |c_n| = ${shown(last.largest)}, \\qquad |X_{\\mathrm{ref}}| \\, \\bar c \\, Q^{${last.nextOrder}} = ${result(band, value.unit)}`,
    ),
  ];
  const all = find(last, "first omitted term", "all omitted orders", null);
  if (all)
    steps.push(
      formula(
        `|X_{\\mathrm{ref}}| \\, \\bar c \\sum_{n \\ge ${last.nextOrder}} Q^{n} = ${result(all, value.unit)}`,
      ),
    );
  return steps;
}

function describeDifferences(value: TruncationValue, series: Series, last: OrderEstimate): WorkingStep[] {
  const band = find(last, "differences of orders", "first omitted term", null);
  if (!band) return [];
  const shifts = series.known
    .filter(({ order }) => order <= last.order)
    .map(({ order, shift }) => {
      const power = last.nextOrder - order;
      return `Q^{${power}} \\cdot ${shown(Math.abs(shift))} = ${shown(value.q.value ** power * Math.abs(shift))}`;
    });
  return [
    heading("Differences of orders"),
    prose(
      "The largest of the leading value and of the shifts from the previous order that exists, each scaled to the first omitted order; at lower orders never less than the spread of the orders known beyond (Epelbaum, Krebs, Meißner 2015).",
    ),
    formula(`\\max\\left\\{ ${shifts.join(";\\; ")} \\right\\} = ${result(band, value.unit)}`),
  ];
}

function describeRescaling(value: TruncationValue, last: OrderEstimate): WorkingStep[] {
  const [degree] = value.degrees;
  if (!value.rescaled || !degree) return [];
  const here = find(last, "uniform prior", "first omitted term", degree.text);
  const there = value.rescaled.bands.find(
    (band) => band.method === "uniform prior" && band.degree === degree.text,
  );
  if (!here || !there) return [];
  return [
    heading("If Q were another"),
    prose(
      `Q is the parameter of the quantity tabulated, and rescaling it rescales every $c_n$. With $Q^2 = ${shown(value.rescaled.q)}$ in its place the same numbers would give a uniform-prior error of $${measured(there.halfWidth, value.unit)}$ instead of $${measured(here.halfWidth, value.unit)}$ at ${degree.text} %. Choose the one in which the coefficients are of natural size.`,
    ),
  ];
}

function describeAssumptions(): WorkingStep[] {
  return [
    heading("What this assumes"),
    prose(
      "A truncation error is a model of what was left out, not a bound: it takes the coefficients that are not known to be of the size of those that are, and the scales to be separated. Fit error, truncation error and scale variation overlap; adding scale variation in quadrature counts part of it twice.",
    ),
  ];
}
