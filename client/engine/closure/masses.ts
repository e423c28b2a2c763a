/** Which masses may make up dimensions: those that symmetries leave room for. */
import { addHalfEdges, noHalfEdges } from "../divergence/half-edges.ts";
import { forbiddingSymmetry } from "../divergence/selection.ts";
import type { Theory } from "../premises/theory.ts";
import type { Settings } from "./read-settings.ts";

const massless: readonly Theory["fields"][number]["kind"][] = [
  "gauge potential",
  "field strength",
  "metric fluctuation",
  "ghost",
  "spin 3/2",
];

/**
 * Whether lines of a field may bring powers of a mass. A shift symmetry or a gauge invariance forbids it; a Weyl
 * spinor needs a partner (or itself) with which a mass term is neutral. For static and Schrödinger fields a residual
 * mass or an energy plays the part.
 */
export function canHaveMass(f: number, theory: Theory, settings: Settings): boolean {
  const field = theory.fields[f];
  if (!field || settings.massless || settings.shift[f] || massless.includes(field.kind)) return false;
  if (field.kind !== "Weyl spinor" || !settings.useSymmetries) return true;
  return theory.fields.some((other, g) => {
    if (other.kind !== "Weyl spinor") return false;
    const one = (index: number) => ({
      ...noHalfEdges(theory),
      plain: theory.fields.map((_, h) => (h === index ? 1 : 0)),
    });
    return forbiddingSymmetry(addHalfEdges(one(f), one(g)), theory) === null;
  });
}
