/** Evaluates the blocks of a notebook, each after what it stands on, and only those whose key has no result yet. */
import type { Evaluation, Problem } from "../evaluation.ts";
import type { KindName } from "../kind.ts";
import { kinds } from "../kinds.ts";
import type { PremisesInputs } from "../premises/inputs.ts";
import { readTheory } from "../premises/read-theory.ts";
import type { Theory } from "../premises/theory.ts";
import type { InputsOf, Shape } from "../shape.ts";
import type { BlockInputs, BlockInstance } from "./block-instance.ts";
import { choosePremises } from "./choose-premises.ts";
import { resultKey } from "./keys.ts";

export interface NotebookOutcome {
  readonly blockId: string;
  readonly kind: KindName;
  readonly key: string;
  /** Id of the Premises computed from; null without any. */
  readonly standsOn: string | null;
  readonly evaluation: Evaluation;
}

/** What is remembered between runs; a Map does. Forgetting costs time only. */
export interface Memo {
  get(key: string): Evaluation | undefined;
  set(key: string, evaluation: Evaluation): unknown;
}

export interface EvaluateOptions {
  readonly memo: Memo;
  /** Told of every exception inside a kind, which is a mistake of ours: the block gets the problem "internal". */
  readonly onInternalError: (error: unknown, block: BlockInstance) => void;
}

/**
 * Blocks in, outcomes out in the same order. Blocks stand on Premises and Premises on nothing, so dependencies have
 * no cycles whatever the document says.
 */
export function evaluateNotebook(
  blocks: readonly BlockInstance[],
  options: EvaluateOptions,
): NotebookOutcome[] {
  const premisesKeys = new Map<BlockInstance, string>();
  const theories = new Map<string, Theory>();
  const keyOfPremises = (premises: BlockInstance): string => {
    const key =
      premisesKeys.get(premises) ?? resultKey("premises", premises.inputs, premisesProblems(premises));
    premisesKeys.set(premises, key);
    return key;
  };
  const theoryOf = (premises: BlockInstance): Theory => {
    const key = keyOfPremises(premises);
    const theory = theories.get(key) ?? readTheory(premises.inputs as unknown as PremisesInputs); // fitted to its shape
    theories.set(key, theory);
    return theory;
  };

  return blocks.map((block) => {
    const choice = choosePremises(block, blocks);
    const found = "found" in choice ? choice.found : null;
    const problems = [
      ...block.problems,
      ...("problem" in choice ? [choice.problem] : []),
      ...brokenPremises(found),
    ];
    const standsOn = found ? [keyOfPremises(found)] : [];
    const key =
      block.kind === "premises"
        ? keyOfPremises(block)
        : resultKey(block.kind, block.inputs, [...standsOn, ...problems.map(digestOf)]);
    const outcome = { blockId: block.id, kind: block.kind, key, standsOn: found?.id ?? null };
    const evaluation =
      problems.length > 0
        ? refused(problems)
        : (options.memo.get(key) ?? evaluateBlock(block, () => (found ? theoryOf(found) : null), options));
    if (evaluation.problems.every(({ code }) => code !== "internal")) options.memo.set(key, evaluation);
    return { ...outcome, evaluation };
  });
}

function evaluateBlock(
  block: BlockInstance,
  theory: () => Theory | null,
  { onInternalError }: EvaluateOptions,
): Evaluation {
  try {
    return kinds[block.kind].evaluate(fitted(block.inputs), theory());
  } catch (error) {
    onInternalError(error, block);
    return refused([{ code: "internal", path: [], facts: { kind: block.kind } }]);
  }
}

/** Inputs of a block instance have been fitted to the shape of its kind, which the type cannot say for all kinds at once. */
function fitted(inputs: BlockInputs): InputsOf<Shape> {
  return inputs as unknown as InputsOf<Shape>;
}

function refused(problems: readonly Problem[]): Evaluation {
  return { value: null, problems, notices: [], scalars: [], working: [] };
}

/** Premises whose inputs do not even fit their shape give no theory. */
function brokenPremises(premises: BlockInstance | null): Problem[] {
  if (!premises || premises.problems.length === 0) return [];
  return [{ code: "premises-broken", path: ["standsOn"], facts: { id: premises.id } }];
}
function premisesProblems(premises: BlockInstance): string[] {
  return premises.problems.map(digestOf);
}
/** Problems found before evaluation enter the key: two blocks refused for different reasons have different results. */
function digestOf({ code, path, facts }: Problem): string {
  return `refused: ${code} ${path.join("/")} ${JSON.stringify(facts)}`;
}
