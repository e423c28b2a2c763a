import { useId } from "react";
import { delimiters, type Corrections } from "./read-file.ts";

interface Props {
  /** Null when the file could not be read as it was taken. */
  readonly delimiter: string | null;
  readonly hasDecimalComma: boolean;
  readonly onChange: (corrections: Required<Corrections>) => void;
}

const names: Readonly<Record<string, string>> = { ",": "commas", ";": "semicolons", "\t": "tabs" };

/** How the file was taken: what separates its values, and its decimal mark. Both can be corrected. */
export function ReadingMarks({ delimiter, hasDecimalComma, onChange }: Props) {
  const id = useId();
  const separated = delimiter !== null && delimiters.includes(delimiter) ? delimiter : ",";
  return (
    <p className="mt-3 flex flex-wrap items-baseline gap-x-3 gap-y-1 text-small">
      <label htmlFor={`${id}-delimiter`}>values are separated by</label>
      <select
        id={`${id}-delimiter`}
        className="block-input block-choice min-h-6"
        value={separated}
        onChange={(event) => onChange({ delimiter: event.target.value, hasDecimalComma })}
      >
        {delimiters.map((one) => (
          <option key={one} value={one}>
            {names[one]}
          </option>
        ))}
      </select>
      <label htmlFor={`${id}-mark`}>decimal mark</label>
      <select
        id={`${id}-mark`}
        className="block-input block-choice min-h-6"
        value={hasDecimalComma ? "comma" : "point"}
        onChange={(event) =>
          onChange({ delimiter: separated, hasDecimalComma: event.target.value === "comma" })
        }
      >
        <option>point</option>
        <option>comma</option>
      </select>
    </p>
  );
}
