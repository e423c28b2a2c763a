/** Evaluates blocks with kinds it is given, each after what it stands on, and only those whose key has no result yet. */
import type { Evaluation, Problem } from "../evaluation.ts";
import type { BlockKind, EvaluationContext, KindName, Progress, Source } from "../kind.ts";
import type { PremisesInputs } from "../premises/inputs.ts";
import { readTheory } from "../premises/read-theory.ts";
import type { Theory } from "../premises/theory.ts";
import type { BlockInstance } from "./block-instance.ts";
import { choosePremises } from "./choose-premises.ts";
import { resultKey } from "./keys.ts";
import { allows, fittedTo, isLong, referencesOf, type Reference } from "./references.ts";

export interface NotebookOutcome {
  readonly blockId: string;
  readonly kind: KindName;
  readonly key: string;
  /** Id of the Premises computed from; null without any. */
  readonly standsOn: string | null;
  readonly evaluation: Evaluation;
}

/** A block left for later, with the key its result will have; blocks that use its result wait with it and have no key yet. */
export interface Postponed {
  readonly blockId: string;
  readonly key: string | null;
}

/** What is remembered between runs; a Map does. Forgetting costs time only. */
export interface Memo {
  get(key: string): Evaluation | undefined;
  set(key: string, evaluation: Evaluation): unknown;
}

export type KindOf = (kind: KindName) => BlockKind;

export interface EvaluateOptions {
  readonly memo: Memo;
  /** Told of every exception inside a kind, which is a mistake of ours: the block gets the problem "internal". */
  readonly onInternalError: (error: unknown, block: BlockInstance) => void;
  /** Told how far a long kind is. */
  readonly onProgress?: (progress: Progress, block: BlockInstance) => void;
  /**
   * With it, long kinds whose result is not in the memo are left out and named here, and with them the blocks that use
   * their results. Without it everything is evaluated.
   */
  readonly onPostponed?: (postponed: Postponed) => void;
}

/** Blocks in, outcomes out in the same order, but for those postponed. `kindOf` is asked for the kinds of these blocks. */
export function evaluateBlocks(
  blocks: readonly BlockInstance[],
  kindOf: KindOf,
  options: EvaluateOptions,
): NotebookOutcome[] {
  const run = new Run(blocks, kindOf, options);
  return blocks.flatMap((block) => run.outcomeOf(block) ?? []);
}

/** One pass over a notebook. Every block is evaluated once, after what it stands on and what it refers to. */
class Run {
  readonly #byId: ReadonlyMap<string, BlockInstance>;
  readonly #outcomes = new Map<BlockInstance, NotebookOutcome | null>();
  /** Blocks being evaluated, outermost first: one that is met again closes a circle. */
  readonly #open: BlockInstance[] = [];
  readonly #premisesKeys = new Map<BlockInstance, string>();
  readonly #theories = new Map<string, Theory>();

  constructor(
    private readonly blocks: readonly BlockInstance[],
    private readonly kindOf: KindOf,
    private readonly options: EvaluateOptions,
  ) {
    this.#byId = new Map(blocks.map((block) => [block.id, block]));
  }

  /** Null when the block is postponed. */
  outcomeOf(block: BlockInstance): NotebookOutcome | null {
    const known = this.#outcomes.get(block);
    if (known !== undefined) return known;
    this.#open.push(block);
    const outcome = this.#evaluate(block);
    this.#open.pop();
    this.#outcomes.set(block, outcome);
    return outcome;
  }

  #evaluate(block: BlockInstance): NotebookOutcome | null {
    const choice = choosePremises(block, this.blocks);
    const found = "found" in choice ? choice.found : null;
    const problems = [
      ...block.problems,
      ...("problem" in choice ? [choice.problem] : []),
      ...brokenPremises(found),
    ];
    const used = this.#sourcesOf(block);
    if (used === "postponed") {
      this.options.onPostponed?.({ blockId: block.id, key: null });
      return null;
    }
    const standsOn = found ? [this.#keyOfPremises(found)] : [];
    const key =
      block.kind === "premises"
        ? this.#keyOfPremises(block)
        : resultKey(block.kind, block.inputs, [
            ...standsOn,
            ...used.keys,
            ...[...problems, ...used.problems].map(digestOf),
          ]);
    const remembered = problems.length > 0 ? refused(problems) : this.options.memo.get(key);
    if (!remembered && isLong(block) && this.options.onPostponed) {
      this.options.onPostponed({ blockId: block.id, key });
      return null;
    }
    const evaluation = remembered ?? this.#compute(block, found, used);
    if (evaluation.problems.every(({ code }) => code !== "internal")) this.options.memo.set(key, evaluation);
    return { blockId: block.id, kind: block.kind, key, standsOn: found?.id ?? null, evaluation };
  }

  #compute(block: BlockInstance, premises: BlockInstance | null, used: UsedSources): Evaluation {
    const context: EvaluationContext = {
      source: (blockId) => used.sources.get(blockId) ?? null,
      tell: (progress) => this.options.onProgress?.(progress, block),
    };
    try {
      const theory = premises ? this.#theoryOf(premises) : null;
      const evaluation = this.kindOf(block.kind).evaluate(fittedTo(block.inputs), theory, context);
      if (used.problems.length === 0) return evaluation;
      return { ...evaluation, problems: [...used.problems, ...evaluation.problems] };
    } catch (error) {
      this.options.onInternalError(error, block);
      return refused([{ code: "internal", path: [], facts: { kind: block.kind } }]);
    }
  }

  #sourcesOf(block: BlockInstance): UsedSources | "postponed" {
    const used = { keys: [] as string[], problems: [] as Problem[], sources: new Map<string, Source>() };
    let isPostponed = false;
    for (const reference of referencesOf(block)) {
      const source = this.#byId.get(reference.blockId);
      const problem = this.#problemOf(reference, source);
      if (problem) used.problems.push(problem);
      if (problem || !source) continue;
      const outcome = this.outcomeOf(source);
      if (outcome === null) {
        isPostponed = true;
        continue;
      }
      used.keys.push(outcome.key);
      const { value, scalars } = outcome.evaluation;
      if (value === null) used.problems.push(problemAt(reference, "reference-broken"));
      else used.sources.set(source.id, { kind: source.kind, value, scalars, title: source.title });
    }
    return isPostponed ? "postponed" : used;
  }

  #problemOf(reference: Reference, source: BlockInstance | undefined): Problem | null {
    if (!source) return problemAt(reference, "reference-deleted");
    if (!allows(reference, source.kind)) return problemAt(reference, "reference-other-kind");
    // Every block of the circle says so, whichever is met first.
    const from = this.#open.at(-1);
    if (from && this.#reaches(source, from, new Set())) return problemAt(reference, "reference-circle");
    return null;
  }

  #reaches(from: BlockInstance, target: BlockInstance, seen: Set<BlockInstance>): boolean {
    if (from === target) return true;
    if (seen.has(from)) return false;
    seen.add(from);
    return referencesOf(from).some(({ blockId }) => {
      const next = this.#byId.get(blockId);
      return next !== undefined && this.#reaches(next, target, seen);
    });
  }

  #keyOfPremises(premises: BlockInstance): string {
    const key =
      this.#premisesKeys.get(premises) ??
      resultKey("premises", premises.inputs, premises.problems.map(digestOf));
    this.#premisesKeys.set(premises, key);
    return key;
  }

  #theoryOf(premises: BlockInstance): Theory {
    const key = this.#keyOfPremises(premises);
    const theory = this.#theories.get(key) ?? readTheory(premises.inputs as unknown as PremisesInputs); // fitted to its shape
    this.#theories.set(key, theory);
    return theory;
  }
}

interface UsedSources {
  readonly keys: readonly string[];
  readonly problems: readonly Problem[];
  readonly sources: ReadonlyMap<string, Source>;
}

function problemAt({ path, blockId }: Reference, code: string): Problem {
  return { code, path, facts: { id: blockId } };
}

function refused(problems: readonly Problem[]): Evaluation {
  return { value: null, problems, notices: [], scalars: [], working: [] };
}

/** Premises whose inputs do not even fit their shape give no theory. */
function brokenPremises(premises: BlockInstance | null): Problem[] {
  if (!premises || premises.problems.length === 0) return [];
  return [{ code: "premises-broken", path: ["standsOn"], facts: { id: premises.id } }];
}
/** Problems found before evaluation enter the key: two blocks refused for different reasons have different results. */
function digestOf({ code, path, facts }: Problem): string {
  return `refused: ${code} ${path.join("/")} ${JSON.stringify(facts)}`;
}
