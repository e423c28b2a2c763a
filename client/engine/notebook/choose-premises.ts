/** Which Premises a block computes from. */
import type { Problem } from "../evaluation.ts";
import { kindDescriptions } from "../descriptions.ts";
import type { BlockInstance } from "./block-instance.ts";

export type PremisesChoice =
  | { readonly found: BlockInstance }
  /** The kind needs none, or may do without and there is no telling which. */
  | { readonly found: null }
  | { readonly problem: Problem };

/**
 * The rule: the Premises chosen by hand; with no choice, the only Premises there is. Several and no choice is an
 * error of a block that needs them: taking the nearest would change results when a block is merely moved.
 */
export function choosePremises(block: BlockInstance, blocks: readonly BlockInstance[]): PremisesChoice {
  const need = kindDescriptions[block.kind].premises;
  if (need === "none") return { found: null };
  const all = blocks.filter(({ kind }) => kind === "premises");
  if (block.standsOn !== null) {
    const chosen = all.find(({ id }) => id === block.standsOn);
    if (chosen) return { found: chosen };
    const other = blocks.some(({ id }) => id === block.standsOn);
    return refuse(other ? "premises-other-kind" : "premises-deleted", { id: block.standsOn });
  }
  const [only] = all;
  if (only && all.length === 1) return { found: only };
  if (need === "optional") return { found: null };
  return refuse(only ? "premises-ambiguous" : "premises-missing", { count: all.length });
}

function refuse(code: string, facts: Problem["facts"]): PremisesChoice {
  return { problem: { code, path: ["standsOn"], facts } };
}
