/** What can be said of a pinned number from what a referee has: the text, the present results, and the stored ones. */
import type { Evaluation } from "#engine/evaluation.ts";
import { formatScalar, parsePinFormat } from "#engine/notebook/pin-format.ts";
import { isSameScalar, readPinValue } from "#engine/notebook/pins.ts";
import type { PinAttributes } from "#schema/block-structure.ts";
import type { BlockResult, Settled } from "../../editor/evaluation/results-store.ts";
import { pinStateOf } from "../../editor/pins/pin-view-state.ts";

export type CheckState =
  /** Its block has not been computed on this page yet. */
  | { readonly state: "waiting" }
  | { readonly state: "holds" }
  | {
      readonly state: "moved";
      readonly now: string;
      readonly settled: Settled | null;
      /** Whether the old value was found in the result it names; false when that result is not at hand. */
      readonly wasChecked: boolean;
    }
  | { readonly state: "loose"; readonly words: string }
  /** What the pin says was never given by the result it names, or is not what it shows. */
  | { readonly state: "unchecked"; readonly words: string; readonly now: string | null };

/**
 * @param resultOf the evaluation under a key, if this page has it: a present result, or one stored by the server
 */
export function checkPin(
  pin: PinAttributes,
  blockExists: boolean,
  result: BlockResult,
  settled: Settled | null,
  resultOf: (key: string) => Evaluation | null,
): CheckState {
  const state = pinStateOf(pin, blockExists, result, settled);
  if (state.status === "waiting") return { state: "waiting" };
  if (state.status === "loose") return { state: "loose", words: state.words };
  const now = state.status === "moved" ? state.now : null;
  const unchecked = (words: string): CheckState => ({ state: "unchecked", words, now });

  const value = readPinValue(pin.value);
  if (value === null) return unchecked("the pin carries no value that can be read");
  const read = formatScalar(value, parsePinFormat(pin.format));
  if (read !== pin.text)
    return unchecked(`the text shows ${quote(pin.text)}, but the value behind it reads ${quote(read)}`);
  const taken = resultOf(pin.resultKey);
  const inResult = taken?.scalars.find(({ id }) => id === pin.scalar);
  if (taken && !(inResult && isSameScalar(inResult.value, value)))
    return unchecked("the result it names does not give this value");

  if (state.status === "holds") return { state: "holds" };
  return { state: "moved", now: state.now, settled: state.settled, wasChecked: taken !== null };
}

const quote = (text: string) => `“${text}”`;
