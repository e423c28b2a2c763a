/** What a table that takes the place of another changes: lines that are new or gone, and values that differ. */
import type { FileColumn } from "./read-file.ts";

export interface PlainTable {
  readonly columns: readonly Pick<FileColumn, "name" | "role">[];
  readonly lines: readonly (readonly string[])[];
}

/** A sentence or two; "" where there was no table before. */
export function whatChanged(before: PlainTable, after: PlainTable): string {
  if (before.lines.length === 0) return "";
  const names = (table: PlainTable) => table.columns.map(({ name }) => name);
  const newColumns = names(after).filter((name) => !names(before).includes(name));
  const goneColumns = names(before).filter((name) => !names(after).includes(name));
  const pairs = paired(before, after);
  const common = names(before).flatMap((name, at) => {
    const other = names(after).indexOf(name);
    return other < 0 ? [] : [[at, other] as const];
  });
  let values = 0;
  for (const [old, fresh] of pairs.both)
    for (const [at, other] of common) if (!isSame(old[at] ?? "", fresh[other] ?? "")) values += 1;
  const parts = [
    ...(newColumns.length > 0
      ? [`${counted(newColumns.length, "column")} new (${newColumns.join(", ")})`]
      : []),
    ...(goneColumns.length > 0
      ? [`${counted(goneColumns.length, "column")} gone (${goneColumns.join(", ")})`]
      : []),
    ...(pairs.added > 0 ? [`${counted(pairs.added, "line")} added`] : []),
    ...(pairs.removed > 0 ? [`${counted(pairs.removed, "line")} removed`] : []),
    ...(values > 0 ? [`${counted(values, "value")} changed`] : []),
  ];
  if (parts.length === 0) return "Nothing in it has changed.";
  return `Against the table before: ${parts.join(", ")}; lines are compared ${pairs.by}.`;
}

interface Pairs {
  readonly both: readonly (readonly [readonly string[], readonly string[]])[];
  readonly added: number;
  readonly removed: number;
  readonly by: string;
}

/** Lines of the same x belong together where each x stands once; else lines of the same place. */
function paired(before: PlainTable, after: PlainTable): Pairs {
  const [old, fresh] = [byX(before), byX(after)];
  if (old && fresh)
    return {
      both: [...old].flatMap(([x, line]) => {
        const other = fresh.get(x);
        return other ? [[line, other] as const] : [];
      }),
      added: [...fresh.keys()].filter((x) => !old.has(x)).length,
      removed: [...old.keys()].filter((x) => !fresh.has(x)).length,
      by: "by their x",
    };
  const shared = Math.min(before.lines.length, after.lines.length);
  return {
    both: before.lines.slice(0, shared).map((line, index) => [line, after.lines[index] ?? []] as const),
    added: after.lines.length - shared,
    removed: before.lines.length - shared,
    by: "in their order",
  };
}

function byX({ columns, lines }: PlainTable): ReadonlyMap<number, readonly string[]> | null {
  const at = columns.findIndex(({ role }) => role === "x");
  if (at < 0) return null;
  const found = new Map<number, readonly string[]>();
  for (const line of lines) {
    const x = Number((line[at] ?? "").replace("−", "-"));
    if ((line[at] ?? "") === "" || !Number.isFinite(x) || found.has(x)) return null;
    found.set(x, line);
  }
  return found;
}

/** 1.50 and 1.5 are one value; what is no number is its text. */
function isSame(one: string, other: string): boolean {
  const numbers = [one, other].map((text) => (text === "" ? NaN : Number(text.replace("−", "-"))));
  return one === other || (numbers[0] !== undefined && numbers[0] === numbers[1]);
}

function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

/** The rows of a document as lines of values, as the engine reads them. */
export function linesOf(rows: readonly Readonly<Record<string, string>>[]): readonly (readonly string[])[] {
  return rows
    .flatMap(({ values = "" }) => values.split("\n"))
    .filter((line) => line.trim() !== "")
    .map((line) => line.split(/[;\t]/).map((value) => value.trim()));
}
