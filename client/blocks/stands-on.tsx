import { kindDescriptions } from "#engine/descriptions.ts";
import { useId } from "react";
import { useBlock } from "./block-handle.ts";

/** Which premises a block computes from: words when there is one answer, a list when there is a choice. */
export function StandsOn() {
  const { kind, readOnly, premisesChoices, standsOn, setStandsOn } = useBlock();
  const id = useId();
  const need = kindDescriptions[kind].premises;
  if (need === "none" || (premisesChoices.length === 0 && need === "optional")) return null;
  const chosen = premisesChoices.find(({ blockId }) => blockId === standsOn);
  if (readOnly || (premisesChoices.length === 1 && chosen)) {
    return (
      <span className="block-stands">{chosen ? `stands on ${nameOf(chosen)}` : "stands on no premises"}</span>
    );
  }
  if (premisesChoices.length === 0) return <span className="block-stands">no premises to stand on</span>;
  return (
    <span className="block-stands">
      <label htmlFor={id}>stands on</label>{" "}
      <select
        id={id}
        className="block-choice"
        value={chosen ? chosen.blockId : ""}
        onChange={(event) => setStandsOn(event.target.value)}
      >
        {!chosen && <option value="">{need === "optional" ? "no premises" : "choose premises"}</option>}
        {premisesChoices.map((choice) => (
          <option key={choice.blockId} value={choice.blockId}>
            {nameOf(choice)}
          </option>
        ))}
      </select>
    </span>
  );
}

function nameOf({ name }: { readonly name: string }): string {
  return name.trim() === "" ? "unnamed premises" : name;
}
