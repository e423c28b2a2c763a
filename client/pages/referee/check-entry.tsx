import type { StoredResult } from "#contract/api.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import { Working } from "../../blocks/parts/working.tsx";
import { useBlockResult, useResultsStore } from "../../editor/evaluation/use-results.ts";
import { useNotebook } from "../../editor/notebook-context.ts";
import { movedWords } from "../../editor/pins/pin-view-state.ts";
import { Button } from "../../ui/button.tsx";
import { Formula, TextWithMath } from "../../ui/math.tsx";
import type { CheckState } from "./check-state.ts";
import { showBlock, showSentence } from "./go-to.ts";
import { inputsInShort, premisesInShort } from "./inputs-in-short.ts";
import type { PlacedPin } from "./placed-pins.ts";
import { RecomputeHere } from "./recompute-here.tsx";
import type { ExcerptPart } from "./sentence-excerpt.ts";

interface Props {
  readonly placed: PlacedPin;
  readonly check: CheckState;
  readonly stored: StoredResult | undefined;
}

export function CheckEntry({ placed, check, stored }: Props) {
  const { editor } = useNotebook();
  const { pin, excerpt } = placed;
  const results = useResultsStore();
  const { evaluation, standsOn } = useBlockResult(pin.blockId);
  const blocks = results.blocks();
  const block = blocks.find(({ id }) => id === pin.blockId) ?? null;
  const premises = blocks.find(({ id }) => id === standsOn) ?? null;
  const label = evaluation?.scalars.find(({ id }) => id === pin.scalar)?.label ?? null;

  return (
    <li className="check-entry" data-check={check.state}>
      <p className="check-sentence">
        <Parts parts={excerpt.before} />
        <Shown text={pin.text} check={check} />
        <Parts parts={excerpt.after} />
      </p>
      <div className="check-body">
        <p className={`check-state check-state-${check.state}`}>
          <span className="check-mark" aria-hidden="true" />
          <StateWords check={check} was={pin.text} />
        </p>
        <dl className="check-facts">
          {block && (
            <>
              <dt>from</dt>
              <dd>
                {kindDescriptions[block.kind].title}
                {block.title !== "" && <i className="check-name"> {block.title}</i>}
                {": "}
                {label ? <TextWithMath text={label} /> : pin.scalar}
              </dd>
              <dt>inputs</dt>
              <dd>
                <Phrases phrases={inputsInShort(block, premises)} />
              </dd>
            </>
          )}
          {premises && (
            <>
              <dt>stands on</dt>
              <dd>
                {premises.title !== "" && <i className="check-name">{premises.title}</i>}
                <Phrases phrases={premisesInShort(premises)} />
              </dd>
            </>
          )}
        </dl>
        <div className="check-tools">
          <Button
            look="quiet"
            className="text-small"
            aria-label={`to the sentence: ${pin.text}`}
            onClick={() => showSentence(editor, placed.position)}
          >
            to the sentence
          </Button>
          {block && (
            <Button
              look="quiet"
              className="text-small"
              aria-label={`to its block: ${pin.text}`}
              onClick={() => showBlock(editor, pin.blockId)}
            >
              to its block
            </Button>
          )}
          {block && <RecomputeHere pin={pin} stored={stored} />}
        </div>
        {evaluation && <Working steps={evaluation.working} />}
      </div>
    </li>
  );
}

function Parts({ parts }: { readonly parts: readonly ExcerptPart[] }) {
  return parts.map((part, index) => {
    // Parts of a sentence have no identity but their place.
    if (part.part === "math") return <Formula key={index} latex={part.latex} />;
    return <span key={index}>{part.text}</span>;
  });
}

/** The number in its sentence, as it is drawn in the text: old and new where it has moved. */
function Shown({ text, check }: { readonly text: string; readonly check: CheckState }) {
  if (check.state !== "moved") return <strong className="check-shown">{text}</strong>;
  return (
    <strong className="check-shown">
      <s className="check-was">{text}</s> <ins className="check-now">{check.now}</ins>
    </strong>
  );
}

function StateWords({ check, was }: { readonly check: CheckState; readonly was: string }) {
  switch (check.state) {
    case "waiting":
      return "being computed";
    case "holds":
      return "holds";
    case "moved":
      return (
        <>
          {movedWords(check.settled)}: was {was}, now {check.now}
          {!check.wasChecked && (
            <span className="check-aside">
              the old value is unchecked: the result it was taken from is not on this page
            </span>
          )}
        </>
      );
    case "loose":
      return `loose: ${check.words}`;
    case "unchecked":
      return `unchecked: ${check.words}${check.now === null ? "" : `; the block says ${check.now}`}`;
  }
}

function Phrases({ phrases }: { readonly phrases: readonly string[] }) {
  if (phrases.length === 0) return <span className="text-ink-2">nothing beyond what it stands on</span>;
  return (
    <ul className="check-phrases">
      {phrases.map((phrase) => (
        <li key={phrase}>{phrase}</li>
      ))}
    </ul>
  );
}
