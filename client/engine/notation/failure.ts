/** How reading typed notation fails: a value with a stable code, never a throw. */

export interface NotationFailure {
  readonly code: string;
  /** `offset` counts UTF-16 units from the start of the typed text; `text` is the offending piece. */
  readonly facts: Readonly<Record<string, string | number>>;
}

export type Read<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly failure: NotationFailure };

export function read<T>(value: T): Read<T> {
  return { ok: true, value };
}
export function failed<T>(code: string, facts: NotationFailure["facts"]): Read<T> {
  return { ok: false, failure: { code, facts } };
}

/** The first failure of one reading. Later ones are consequences and are dropped. */
export class FirstFailure {
  failure: NotationFailure | null = null;
  note(code: string, facts: NotationFailure["facts"]): void {
    this.failure ??= { code, facts };
  }
}
