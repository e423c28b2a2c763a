/** Reads the expansion parameter Q: a number with or without uncertainty, or from the scales of the premises. */
import type { Problem } from "../evaluation.ts";
import type { Scale, ScaleRole, Theory } from "../premises/theory.ts";
import { readNumber } from "./read-orders.ts";

export interface ExpansionParameter {
  readonly value: number;
  readonly sigma: number;
  readonly latex: string;
}
export type ReadExpansionParameter =
  | { readonly ok: true; readonly q: ExpansionParameter }
  | { readonly ok: false; readonly problems: readonly Problem[] };

function refuse(code: string, facts: Readonly<Record<string, string | number>> = {}): ReadExpansionParameter {
  return { ok: false, problems: [{ code, path: ["q"], facts }] };
}

export function readExpansionParameter(text: string, theory: Theory | null): ReadExpansionParameter {
  const read = text.trim() === "" ? fromRoles(theory) : fromNumber(text);
  if (!read.ok) return read;
  return read.q.value > 0 ? read : refuse("q-not-positive", { value: read.q.value });
}

/** "0.3", "3/10", "0.30(5)", "0.30 ± 0.05", "0.30 +- 0.05". Digits in parentheses count in the last place. */
function fromNumber(text: string): ReadExpansionParameter {
  const spread = /^\s*(?<value>[^()±]+?)\s*(?:\((?<digits>\d+)\)|(?:±|\+-|\\pm)\s*(?<sigma>\S+))?\s*$/u.exec(
    text,
  )?.groups;
  const value = readNumber(spread?.["value"] ?? "");
  if (value === null) return refuse("q-unreadable", { text });
  const digits = spread?.["digits"];
  const decimals = /\.(\d*)/.exec(spread?.["value"] ?? "")?.[1]?.length ?? 0;
  const sigma = digits
    ? Number(digits) * 10 ** -decimals
    : (readNumber(spread?.["sigma"] ?? "0")?.toFloat() ?? NaN);
  if (!(sigma >= 0)) return refuse("q-unreadable", { text });
  return { ok: true, q: { value: value.toFloat(), sigma, latex: "Q" } };
}

/** Probe over heavy scale; relative uncertainties add in quadrature. */
function fromRoles(theory: Theory | null): ReadExpansionParameter {
  if (theory === null) return refuse("q-needs-premises");
  const one = (role: ScaleRole): Scale | null => {
    const found = theory.scales.filter((scale) => scale.role === role);
    return found.length === 1 ? (found[0] ?? null) : null;
  };
  const probe = one("probe");
  const heavy = one("heavy");
  if (!probe || !heavy) return refuse("q-needs-roles");
  const sizes = [probe, heavy].map((scale) => scale.gev ?? (scale.value === null ? null : scale));
  const [top, bottom] = sizes;
  const withoutNumber = [probe, heavy].find((_, index) => !sizes[index]);
  if (!top || !bottom || top.value === null || bottom.value === null)
    return refuse("scale-without-number", { symbol: withoutNumber?.symbol ?? "" });
  if ((probe.gev === null) !== (heavy.gev === null))
    return refuse("q-has-units", { text: `${probe.symbol}/${heavy.symbol}` });
  if (bottom.value === 0) return refuse("q-not-finite", { text: `${probe.symbol}/${heavy.symbol}` });
  const value = top.value / bottom.value;
  const sigma = Math.hypot(top.sigma / bottom.value, (value * bottom.sigma) / bottom.value);
  return { ok: true, q: { value, sigma, latex: `\\frac{${probe.latex}}{${heavy.latex}}` } };
}
