import { useId } from "react";
import { classes } from "../../ui/classes.ts";
import { placeKey, useBlock, valueAt, type FieldPlace } from "../block-handle.ts";
import { ColleagueMarks } from "./colleague-marks.tsx";
import { ProblemList, useProblemsAt } from "./problem-list.tsx";

export interface Option {
  readonly value: string;
  readonly label: string;
}

interface Props {
  readonly place: FieldPlace;
  readonly label: string;
  readonly showLabel?: boolean;
  readonly options: readonly (Option | string)[];
  readonly hint?: string;
}

/** One of a few values: a native list, known to every hand, screen reader and phone. */
export function ChoiceField({ place, label, showLabel = false, options, hint }: Props) {
  const block = useBlock();
  const problems = useProblemsAt(place);
  const id = useId();
  const value = valueAt(block, place);
  const known = options.map((option) =>
    typeof option === "string" ? { value: option, label: option } : option,
  );
  const shown = known.find((option) => option.value === value);
  const described = [hint && `${id}-hint`, problems.length > 0 && `${id}-problems`].filter(Boolean).join(" ");
  return (
    <div className={classes("block-field", showLabel && "block-field-labelled")} data-place={placeKey(place)}>
      {showLabel && (
        <label className="block-label" htmlFor={id}>
          {label}
        </label>
      )}
      <div className="block-field-box">
        {block.readOnly ? (
          <span className="block-input block-choice">
            <span className="sr-only">{showLabel ? `${label}: ` : ""}</span>
            {shown?.label ?? value}
          </span>
        ) : (
          <select
            id={id}
            aria-label={showLabel ? undefined : label}
            aria-describedby={described || undefined}
            aria-invalid={problems.length > 0 || undefined}
            className="block-input block-choice"
            value={value}
            onFocus={() => block.setFocus(place)}
            onBlur={() => block.setFocus(null)}
            onChange={(event) => block.setValue(place, event.target.value)}
          >
            {!shown && <option value={value}>{value === "" ? "choose" : `${value} (gone)`}</option>}
            {known.map((option) => (
              <option key={option.value} value={option.value}>
                {option.label}
              </option>
            ))}
          </select>
        )}
        <ColleagueMarks place={place} />
      </div>
      {hint && (
        <span id={`${id}-hint`} className="block-hint">
          {hint}
        </span>
      )}
      <ProblemList id={`${id}-problems`} problems={problems} />
    </div>
  );
}
