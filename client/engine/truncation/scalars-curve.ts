/** The numbers of a curve that can be pinned into prose. */
import { roundFloat, type Scalar } from "../evaluation.ts";
import type { Covered, CurveValue, DrawnDensity } from "./curve-value.ts";

const checkNames = {
  coverage: "coverage of the intervals",
  distance: "distances of the coefficients",
  pivoted: "pivoted-Cholesky errors",
  coefficients: "coefficients within their bands",
} as const;

/** All other scalars of the block are at the x of `at`. */
export function describeCurveScalars({ at, xUnit, variable, covered, correlated }: CurveValue): Scalar[] {
  const unit = xUnit === "" ? {} : { unit: xUnit };
  const scalars: Scalar[] = [
    {
      id: "at",
      label: `$${variable}$ at which the methods stand side by side`,
      value: { type: "number", value: at, ...unit },
    },
  ];
  for (const { degree, inside, count } of totals(covered))
    scalars.push({
      id: `covered/${degree}`,
      label: `share of measured values in the ${degree} % intervals, all orders together`,
      value: { type: "number", value: roundFloat(inside / count) },
    });
  if (!correlated) return scalars;
  const { breakdown, lengthPosterior, length, tau2 } = correlated;
  scalars.push({
    id: "length",
    label: `length scale of the coefficients in $${variable}$`,
    value: { type: "number", value: length, ...unit },
  });
  scalars.push({
    id: "cbar",
    label: "size of the coefficients, $\\tau$",
    value: { type: "number", value: roundFloat(Math.sqrt(tau2)) },
  });
  if (lengthPosterior)
    scalars.push(
      ...densityScalars("length", `length scale in $${variable}$`, { ...lengthPosterior, unit: xUnit }),
    );
  if (breakdown)
    scalars.push(...densityScalars("breakdown", `breakdown scale $${breakdown.latex}$`, breakdown.posterior));
  for (const { order, tail, distance } of correlated.checks.orders) {
    scalars.push({
      id: `distance/${order}`,
      label: `squared distance of the coefficients $c_{${order}}$`,
      value: { type: "number", value: distance },
    });
    scalars.push({
      id: `tail/${order}`,
      label: `probability of a larger distance of $c_{${order}}$`,
      value: { type: "number", value: tail },
    });
  }
  for (const { check, against } of correlated.findings) {
    scalars.push({
      id: `check/${check}`,
      label: checkNames[check],
      value: { type: "word", text: against ? "against the model" : "as expected" },
    });
  }
  return scalars;
}

/** All orders together, by degree of belief. */
export function totals(covered: readonly Covered[]): Omit<Covered, "order">[] {
  const degrees = [...new Set(covered.map(({ degree }) => degree))];
  return degrees.map((degree) => {
    const own = covered.filter((one) => one.degree === degree);
    const sum = (of: (one: Covered) => number) => own.reduce((so, one) => so + of(one), 0);
    return { degree, inside: sum(({ inside }) => inside), count: sum(({ count }) => count) };
  });
}

function densityScalars(
  id: string,
  label: string,
  { median, mode, intervals, unit }: DrawnDensity,
): Scalar[] {
  const withUnit = unit === "" ? {} : { unit };
  const number = (value: number) => ({ type: "number" as const, value, ...withUnit });
  return [
    { id: `${id}/median`, label: `median of the ${label}`, value: number(median) },
    { id: `${id}/mode`, label: `most probable ${label}`, value: number(mode) },
    ...intervals.flatMap(({ degree, low, high }) => [
      {
        id: `${id}/${degree}/low`,
        label: `lower end of the ${degree} % interval of the ${label}`,
        value: number(low),
      },
      {
        id: `${id}/${degree}/high`,
        label: `upper end of the ${degree} % interval of the ${label}`,
        value: number(high),
      },
    ]),
  ];
}
