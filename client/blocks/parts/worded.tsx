import { wordProblem } from "#contract/problem-words.ts";
import type { Problem } from "#engine/evaluation.ts";
import { TextWithMath } from "../../ui/math.tsx";

/** A problem in plain words. In a file of its own: the words are fetched with the first problem. */
export function Worded({ problem }: { readonly problem: Problem }) {
  return <TextWithMath text={wordProblem(problem)} />;
}
