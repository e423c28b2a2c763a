import type { Problem } from "#engine/evaluation.ts";
import { lazy, Suspense } from "react";
import { placeKey, useBlock, type FieldPlace } from "../block-handle.ts";

const Worded = lazy(async () => ({ default: (await import("./worded.tsx")).Worded }));

const none: readonly Problem[] = [];

function Sentence({ problem }: { readonly problem: Problem }) {
  return (
    <Suspense fallback="…">
      <Worded problem={problem} />
    </Suspense>
  );
}

/** The problems of the block that concern one field, said beside it. */
export function useProblemsAt(place: FieldPlace): readonly Problem[] {
  const problems = useBlock().evaluation?.problems ?? none;
  const key = placeKey(place);
  return problems.filter(({ path }) => path.join("/") === key);
}

/** What is wrong, in words. */
export function ProblemList({
  id,
  problems,
}: {
  readonly id?: string;
  readonly problems: readonly Problem[];
}) {
  if (problems.length === 0) return null;
  return (
    <ul id={id} className="block-problems">
      {problems.map((problem) => (
        <li key={`${problem.code} ${problem.path.join("/")} ${JSON.stringify(problem.facts)}`}>
          <Sentence problem={problem} />
        </li>
      ))}
    </ul>
  );
}

/** Problems that no field of the form shows: of the block as a whole, of a table, of a row that is gone. */
export function OtherProblems() {
  const block = useBlock();
  const problems = block.evaluation?.problems ?? none;
  return <ProblemList problems={problems.filter(({ path }) => !hasField(block, path))} />;
}

function hasField(
  { fields, tables }: Pick<ReturnType<typeof useBlock>, "fields" | "tables">,
  path: readonly string[],
): boolean {
  const [first = "", rowId, column] = path;
  // A table says its own below itself.
  if (path.length === 1) return first in fields || first in tables;
  const row = tables[first]?.find(({ id }) => id === rowId);
  return row !== undefined && (column === undefined || column in row);
}

/** Cautions that go with a result. */
export function Notices() {
  const notices = useBlock().evaluation?.notices ?? none;
  if (notices.length === 0) return null;
  return (
    <ul className="block-notices">
      {notices.map((notice) => (
        <li key={`${notice.code} ${notice.path.join("/")} ${JSON.stringify(notice.facts)}`}>
          <Sentence problem={notice} />
        </li>
      ))}
    </ul>
  );
}
