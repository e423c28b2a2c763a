/** A block as it stands in a document or a file: which kind, on which premises, with which inputs. */
import type { Problem } from "../evaluation.ts";
import type { KindName } from "../kind.ts";

export interface BlockRow {
  readonly id: string;
  readonly [column: string]: string;
}
/** Text by field name, rows by table name, as the shape of the kind says: complete, nothing beyond it. */
export type BlockInputs = Readonly<Record<string, string | readonly BlockRow[]>>;

export interface BlockInstance {
  readonly id: string;
  readonly kind: KindName;
  /** Id of the Premises block chosen by hand; null leaves the choice to the rule of `choosePremises`. */
  readonly standsOn: string | null;
  readonly inputs: BlockInputs;
  /** Title of the block or name of the theory; "" when it has none. */
  readonly title: string;
  /** What is wrong with the inputs before any kind looks at them: they are then not evaluated. */
  readonly problems: readonly Problem[];
}

/** A pin as it stands in the prose; see schema/block-structure.ts for what each text means. */
export interface PinInstance {
  readonly pinId: string;
  readonly blockId: string;
  readonly scalar: string;
  readonly resultKey: string;
  /** JSON of a `ScalarValue`. */
  readonly value: string;
  readonly text: string;
  readonly format: string;
}
