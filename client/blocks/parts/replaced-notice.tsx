import type { FieldDraft } from "./use-field-draft.ts";

/** Says that a colleague's value has taken the place of one's own, and offers the way back. Read aloud as it comes. */
export function ReplacedNotice({
  draft,
  onChosen,
}: {
  readonly draft: FieldDraft;
  readonly onChosen: () => void;
}) {
  const { replaced } = draft;
  if (!replaced) return null;
  const { by, from, to, mine, typing } = replaced;
  const choose = (act: () => void) => ({
    // Leaving the field would count as keeping one's own text.
    onPointerDown: (event: { preventDefault(): void }) => event.preventDefault(),
    onClick: () => {
      act();
      onChosen();
    },
  });
  return (
    <p className="block-replaced" role="status">
      {by} replaced {quoted(from)} by {quoted(to)}.{" "}
      {typing && (
        <button type="button" className="block-link" {...choose(draft.takeTheirs)}>
          Take {quoted(to)}
        </button>
      )}{" "}
      <button type="button" className="block-link" {...choose(draft.putBackMine)}>
        {typing ? `Keep ${quoted(mine)}` : `Put back ${quoted(mine)}`}
      </button>
    </p>
  );
}

function quoted(text: string): string {
  return text === "" ? "nothing" : `“${text.length > 40 ? `${text.slice(0, 39)}…` : text}”`;
}
