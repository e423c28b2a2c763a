import { useMemo } from "react";
import { readPlainName, renameInLatex, renameInTerm } from "#engine/notation/rename.ts";
import { nameLatex, type Name } from "#engine/notation/names.ts";
import { Formula } from "../../ui/math.tsx";
import { useBlock, useOtherBlocks, type UseCounts } from "../block-handle.ts";

interface Props {
  readonly from: string;
  readonly to: string;
  readonly onClose: () => void;
}

/** A symbol was renamed where it is declared: offers to rename it where it is used. */
export function RenameOffer({ from, to, onClose }: Props) {
  const { rewriteUses, tables } = useBlock();
  const others = useOtherBlocks();
  const names = useMemo(() => ({ from: readPlainName(from), to: readPlainName(to) }), [from, to]);
  const rewriting = useMemo(() => {
    const [before, after] = [names.from, names.to];
    if (!before || !after) return null;
    return {
      term: (text: string) => renameInTerm(text, before, after),
      latex: (latex: string) => renameInLatex(latex, before, after),
    };
  }, [names]);
  const isTaken = [...(tables["fields"] ?? []), ...(tables["scales"] ?? [])].some(
    (row) => row["symbol"] === from,
  );
  // Counted again when any block changes: a colleague may be renaming by hand.
  const counts = useMemo(
    () => (rewriting && !isTaken ? rewriteUses(rewriting, false) : null),
    // eslint-disable-next-line react-hooks/exhaustive-deps -- the others are what is counted in
    [rewriting, isTaken, rewriteUses, others, tables],
  );
  if (!rewriting || !names.from || !names.to || !counts || counts.entries + counts.formulas === 0)
    return null;
  return (
    <div className="premises-rename" role="group" aria-label="Rename the uses of a symbol">
      <p>
        <Symbol name={names.from} /> is now <Symbol name={names.to} />. The old name is still used in{" "}
        {sayUses(counts)}.
      </p>
      <button
        type="button"
        className="block-link"
        onClick={() => {
          rewriteUses(rewriting, true);
          onClose();
        }}
      >
        rename it there too
      </button>
      <button type="button" className="block-link" onClick={onClose}>
        leave it
      </button>
    </div>
  );
}

function Symbol({ name }: { readonly name: Name }) {
  return <Formula latex={nameLatex(name)} />;
}

/** @example sayUses({ entries: 3, formulas: 1 }) // "3 entries of blocks and 1 formula in the text" */
export function sayUses({ entries, formulas }: UseCounts): string {
  const parts = [
    entries === 0 ? "" : entries === 1 ? "1 entry of a block" : `${entries} entries of blocks`,
    formulas === 0 ? "" : formulas === 1 ? "1 formula in the text" : `${formulas} formulas in the text`,
  ];
  return parts.filter((part) => part !== "").join(" and ");
}
