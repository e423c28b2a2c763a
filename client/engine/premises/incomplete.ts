/** What blocks that count a theory as a whole say when part of it could not be read. */
import type { Notice } from "../evaluation.ts";
import type { Theory } from "./theory.ts";

/** Rows in error are left out of a theory, so a list or a sum over its terms may lack them. */
export function incompletePremises({ problems }: Theory): Notice[] {
  return problems.length === 0
    ? []
    : [{ code: "premises-incomplete", path: ["standsOn"], facts: { count: problems.length } }];
}
