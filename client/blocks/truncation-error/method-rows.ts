/** The methods side by side: one row for each method and what it estimates, one column for each degree of belief. */
import { unlessTyped, type Method, type Omitted } from "#engine/truncation/shape.ts";
import type { Band, TruncationValue } from "#engine/truncation/value.ts";

export interface MethodRow {
  readonly method: Method;
  readonly omitted: Omitted;
  /** By `Degree.text`; a method without probability has one band under "". */
  readonly bands: ReadonlyMap<string, Band>;
  readonly chosen: boolean;
}

export function methodRows(bands: readonly Band[], highlighted: Band | null): MethodRow[] {
  const rows = new Map<string, { method: Method; omitted: Omitted; bands: Map<string, Band> }>();
  for (const band of bands) {
    const key = `${band.method} ${band.omitted}`;
    const row = rows.get(key) ?? {
      method: band.method,
      omitted: band.omitted,
      bands: new Map<string, Band>(),
    };
    row.bands.set(band.degree ?? "", band);
    rows.set(key, row);
  }
  return [...rows.values()].map((row) => ({
    ...row,
    chosen: row.method === highlighted?.method && row.omitted === highlighted.omitted,
  }));
}

const shortNames: Readonly<Record<Method, string>> = {
  "conjugate prior": "conjugate",
  "uniform prior": "uniform",
  "prior set A": "setA",
  "prior set B": "setB",
  "prior set C": "setC",
  "first omitted term": "first-omitted",
  "differences of orders": "differences",
  "correlated along x": "correlated",
};

/** `Scalar.id` of a band of the last order, as engine/truncation/scalars.ts names it. */
export function bandScalar({ method, omitted, degree }: Band): string {
  const hasUsual =
    method !== "first omitted term" && method !== "uniform prior" && method !== "differences of orders";
  const first = hasUsual && omitted === "first omitted term" ? "-first" : "";
  const all = method === "first omitted term" && omitted === "all omitted orders" ? "-all" : "";
  return `${shortNames[method]}${first}${all}${degree === null ? "" : `/${degree}`}`;
}

/** What each method takes for granted, in a few words; LaTeX between dollar signs. */
export function assumptionOf(
  method: Method,
  omitted: Omitted,
  fields: Readonly<Record<string, string>>,
): string {
  const what = omitted === "all omitted orders" ? "all orders summed" : "first omitted term alone";
  switch (method) {
    case "conjugate prior":
      return `coefficients normal about 0, $\\nu_0 = ${numberIn(fields["nu0"])}$, $\\tau_0 = ${numberIn(fields["tau0"])}$; ${what}`;
    case "uniform prior":
      return `coefficients bounded, their scale unknown; ${what}`;
    case "prior set A":
      return `coefficients bounded by $\\bar c$ from ${setting(fields, "cbarLow")} to ${setting(fields, "cbarHigh")}; ${several(fields, what)}`;
    case "prior set B":
      return `coefficients bounded by $\\bar c$ near 1, $\\sigma = ${setting(fields, "cbarWidth")}$; ${several(fields, what)}`;
    case "prior set C":
      return `coefficients normal, $\\bar c$ from ${setting(fields, "cbarLow")} to ${setting(fields, "cbarHigh")}; ${several(fields, what)}`;
    case "correlated along x":
      return `coefficients normal and alike over a length in $x$; ${what}`;
    case "first omitted term":
      return `the largest coefficient so far repeats; ${what}`;
    case "differences of orders":
      return "shifts between orders shrink by $Q$";
  }
}

function setting(fields: Readonly<Record<string, string>>, field: keyof typeof unlessTyped): string {
  const typed = (fields[field] ?? "").trim();
  return numberIn(typed === "" ? unlessTyped[field] : typed);
}
function several(fields: Readonly<Record<string, string>>, what: string): string {
  const terms = (fields["terms"] ?? "").trim();
  return terms === "" || terms === "1" ? what : `${terms} orders summed`;
}

function numberIn(text: string | undefined): string {
  return (text ?? "").replace(/[^0-9.eE+-]/g, "") || "?";
}

export function resolutionOf({ orders }: TruncationValue): number {
  const widths = (orders.at(-1)?.bands ?? []).map(({ halfWidth }) => halfWidth).filter((width) => width > 0);
  return widths.length === 0 ? 0 : Math.min(...widths);
}
