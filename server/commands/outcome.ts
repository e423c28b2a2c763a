/** How a command ends: with its value, or refused for a reason a person can act on. */

export const refusalCodes = [
  "malformed",
  "signed-out",
  "cross-site",
  "forbidden",
  "not-found",
  "archived",
  "last-owner",
  "already-there",
  "gone",
  "too-large",
  "unsupported-media",
  "invalid",
  "too-many",
  "unexpected",
  "unavailable",
] as const;
export type RefusalCode = (typeof refusalCodes)[number];

export interface Refusal {
  readonly ok: false;
  readonly code: RefusalCode;
  /** A sentence for this case; without it the code's own sentence is said. */
  readonly detail?: string;
}
export type Outcome<Value> = { readonly ok: true; readonly value: Value } | Refusal;

export function refuse(code: RefusalCode, detail?: string): Refusal {
  return detail === undefined ? { ok: false, code } : { ok: false, code, detail };
}

export function succeed<Value>(value: Value): Outcome<Value> {
  return { ok: true, value };
}
