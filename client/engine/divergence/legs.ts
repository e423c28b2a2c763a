/** How the legs of an amplitude are named: by row id for keys, as a product of fields for readers. */
import type { Field, Theory } from "../premises/theory.ts";
import { totalOf, type HalfEdges } from "./half-edges.ts";
import type { Legs } from "./value.ts";

const spinors: readonly Field["kind"][] = [
  "Weyl spinor",
  "Majorana spinor",
  "Dirac spinor",
  "static heavy field",
  "spin 3/2",
  "massive spin 3/2",
];

/** Whether the field carries spinor indices; ghosts are fermions without them. */
export function isSpinor(field: Field): boolean {
  return spinors.includes(field.kind);
}

/** The conjugate as people write it: a bar over spinors and ghosts, a dagger elsewhere. */
function conjugateLatex(field: Field): string {
  return isSpinor(field) || field.kind === "ghost" ? `\\bar{${field.latex}}` : `${field.latex}^{\\dagger}`;
}
function conjugateText(field: Field): string {
  return isSpinor(field) || field.kind === "ghost" ? `${field.symbol}bar` : `${field.symbol}*`;
}

/** `count` equal factors; a symbol that already has a superscript is bracketed first. */
function power(latex: string, count: number): string {
  if (count === 1) return latex;
  return `${latex.includes("^") ? `(${latex})` : latex}^{${count}}`;
}

export function productLatex(edges: HalfEdges, theory: Theory): string {
  const factors = theory.fields.flatMap((field, f) => {
    const plain = edges.plain[f] ?? 0;
    const conjugate = edges.conjugate[f] ?? 0;
    return [
      ...(conjugate > 0 ? [power(conjugateLatex(field), conjugate)] : []),
      ...(plain > 0 ? [power(field.latex, plain)] : []),
    ];
  });
  return factors.length === 0 ? "1" : factors.join("\\,");
}

export function productText(edges: HalfEdges, theory: Theory): string {
  const factors = theory.fields.flatMap((field, f) => {
    const word = (symbol: string, count: number) =>
      count === 0 ? [] : [count === 1 ? symbol : `${symbol}^${count}`];
    return [
      ...word(conjugateText(field), edges.conjugate[f] ?? 0),
      ...word(field.symbol, edges.plain[f] ?? 0),
    ];
  });
  return factors.join(" ");
}

export function describeLegs(edges: HalfEdges, theory: Theory): Legs {
  const fields = theory.fields.flatMap((field, f) => {
    const count = edges.plain[f] ?? 0;
    const conjugateCount = edges.conjugate[f] ?? 0;
    if (count + conjugateCount === 0) return [];
    return [
      {
        fieldRowId: field.rowId,
        symbol: field.symbol,
        count,
        conjugateCount,
        selfConjugate: field.selfConjugate,
      },
    ];
  });
  const key = fields
    .map(({ fieldRowId, count, conjugateCount, selfConjugate }) =>
      selfConjugate ? `${fieldRowId}:${count}` : `${fieldRowId}:${count}:${conjugateCount}`,
    )
    .join(",");
  return {
    key: key === "" ? "vacuum" : key,
    latex: productLatex(edges, theory),
    text: key === "" ? "vacuum" : productText(edges, theory),
    total: totalOf(edges),
    fields: fields.map(({ selfConjugate: _, ...field }) => field),
  };
}
