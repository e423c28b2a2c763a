/** What is counted, after reading: fields with their conjugates, and the groups that act on them. */
import type { Rational } from "../exact/rational.ts";
import type { Spin } from "./lorentz-integral.ts";
import type { Representation } from "./representations.ts";

/** Flavours: how many, or the symbol n_f. */
export type Flavours = number | "symbolic";

/** A field or the conjugate of one. */
export interface Quantum {
  readonly rowId: string;
  readonly latex: string;
  readonly spin: Spin | "scalar";
  readonly pseudoscalar: boolean;
  readonly isFermion: boolean;
  readonly flavours: Flavours;
  /** By gauge group, in the order of `Content.gauge`. */
  readonly representations: readonly Representation[];
  /** For each O(N): whether it is the vector. */
  readonly vectors: readonly boolean[];
  /** By additive charge, in the order of `Content.charges`. */
  readonly charges: readonly Rational[];
  /** Index of the conjugate; its own when it is real. */
  readonly conjugate: number;
}

/** A charge that an operator must have: one of these, or with `modulo` one of these modulo it; null keeps all. */
export interface Charge {
  readonly name: string;
  readonly modulo: number | null;
  readonly kept: readonly Rational[] | null;
}

export interface Content {
  readonly d: number;
  readonly withParity: boolean;
  readonly quanta: readonly Quantum[];
  /** N of each SU(N), with its name. */
  readonly gauge: readonly { readonly name: string; readonly n: number }[];
  readonly orthogonal: readonly { readonly name: string; readonly n: number }[];
  readonly charges: readonly Charge[];
}
