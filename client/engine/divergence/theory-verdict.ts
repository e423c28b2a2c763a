/** Renormalisability by power counting, from the dimensions of couplings and fields alone. */
import type { LinearForm } from "../exact/linear-form.ts";
import { Rational } from "../exact/rational.ts";
import { shown } from "../exact/shown.ts";
import type { Theory } from "../premises/theory.ts";
import { countOf } from "./half-edges.ts";
import type { TheoryVerdict, VerdictRange } from "./value.ts";
import { interactionTerms } from "./vertex-sets.ts";

interface Forms {
  /** [g] of the interactions with three or more legs, and of bilinears, which matter only when negative. */
  readonly couplings: readonly LinearForm[];
  readonly bilinears: readonly LinearForm[];
  /** δ of the fields that interact. */
  readonly weights: readonly LinearForm[];
}

function formsOf(theory: Theory): Forms {
  const terms = interactionTerms(theory);
  const legsOf = (edges: (typeof terms)[number]["edges"]) =>
    theory.fields.reduce((sum, _, f) => sum + countOf(edges, f), 0);
  const interacting = terms.filter(({ edges }) => legsOf(edges) > 2);
  return {
    couplings: interacting.map(({ term }) => term.ultravioletCoefficient),
    bilinears: terms
      .filter(({ edges }) => legsOf(edges) === 2)
      .map(({ term }) => term.ultravioletCoefficient),
    weights: theory.fields
      .filter((_, f) => interacting.some(({ edges }) => countOf(edges, f) > 0))
      .map(({ weight }) => weight),
  };
}

/**
 * All [g] > 0: finitely many divergent graphs. Some [g] = 0: finitely many divergent amplitudes, unless a field with
 * δ ≤ 0 can be added to any amplitude at no cost. Some [g] < 0: every amplitude diverges at some order.
 * Source: Peskin, Schroeder (1995), section 10.1; the case δ ≤ 0 is an own derivation from ω = d − Σ E δ − Σ V [g].
 */
function verdictFrom(
  signs: (forms: readonly LinearForm[]) => readonly number[],
  forms: Forms,
): TheoryVerdict {
  const couplings = signs(forms.couplings);
  const bilinears = signs(forms.bilinears);
  if (couplings.length === 0) return "free";
  if ([...couplings, ...bilinears].some((sign) => sign < 0)) return "new terms at every order";
  if (couplings.every((sign) => sign > 0)) return "super-renormalisable";
  return signs(forms.weights).some((sign) => sign <= 0)
    ? "infinitely many divergent amplitudes"
    : "renormalisable";
}

const signsAt =
  (value: (form: LinearForm) => Rational) =>
  (forms: readonly LinearForm[]): number[] =>
    forms.map((form) => value(form).sign());

export interface RenormalisabilityVerdict {
  /** Null when it depends on a symbol. */
  readonly verdict: TheoryVerdict | null;
  readonly ranges: readonly VerdictRange[];
  /** Whether every interacting field has δ > 0; null when that depends on a symbol. */
  readonly finitelyManyPerOrder: boolean | null;
}

export function renormalisability(theory: Theory): RenormalisabilityVerdict {
  const forms = formsOf(theory);
  const all = [...forms.couplings, ...forms.bilinears, ...forms.weights];
  const [symbol, ...others] = [...new Set(all.flatMap((form) => form.freeSymbols()))];
  if (!symbol) {
    const constant = signsAt((form) => form.constant);
    return {
      verdict: verdictFrom(constant, forms),
      ranges: [],
      finitelyManyPerOrder: constant(forms.weights).every((sign) => sign > 0),
    };
  }
  if (others.length > 0) return { verdict: null, ranges: [], finitelyManyPerOrder: null };
  return { verdict: null, ranges: rangesIn(symbol, all, forms), finitelyManyPerOrder: null };
}

/** The verdict at each dimension where some sign changes, and on the open intervals between, for positive values. */
function rangesIn(symbol: "d" | "D" | "z", all: readonly LinearForm[], forms: Forms): VerdictRange[] {
  const zeros = all
    .map((form) => form.zeroIn(symbol))
    .filter((zero): zero is Rational => zero !== null && zero.sign() > 0);
  const sorted = zeros
    .sort((a, b) => a.compare(b))
    .filter((zero, n, list) => n === 0 || !zero.equals(list[n - 1] ?? zero));
  const verdictAt = (value: Rational) =>
    verdictFrom(
      signsAt((form) => form.at(symbol, value).constant),
      forms,
    );
  const pieces: Piece[] = [];
  let below = Rational.zero;
  for (const zero of sorted) {
    pieces.push({ from: below, to: zero, verdict: verdictAt(below.plus(zero).over(Rational.of(2))) });
    pieces.push({ from: zero, to: zero, verdict: verdictAt(zero) });
    below = zero;
  }
  pieces.push({ from: below, to: null, verdict: verdictAt(below.plus(Rational.one)) });
  return mergeEqual(pieces).map(({ from, to, verdict }) => ({
    symbol,
    from: from && shown(from),
    to: to && shown(to),
    verdict,
  }));
}

interface Piece {
  readonly from: Rational | null;
  readonly to: Rational | null;
  readonly verdict: TheoryVerdict;
}

/** Two intervals and the point between them become one interval where the verdict is the same throughout. */
function mergeEqual(pieces: readonly Piece[]): Piece[] {
  return pieces.reduce<Piece[]>((merged, piece) => {
    const [before, point] = merged.slice(-2);
    const isInterval = !(piece.from && piece.to && piece.from.equals(piece.to));
    if (
      !isInterval ||
      !before ||
      !point ||
      point.verdict !== piece.verdict ||
      before.verdict !== piece.verdict
    )
      return [...merged, piece];
    return [...merged.slice(0, -2), { ...piece, from: before.from }];
  }, []);
}
