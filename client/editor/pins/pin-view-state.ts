/** What the page says about a pin: whether it holds, and what to do if it does not. */
import type { Evaluation } from "#engine/evaluation.ts";
import { formatScalar, parsePinFormat } from "#engine/notebook/pin-format.ts";
import { pinStatus, type PinStatus } from "#engine/notebook/pins.ts";
import type { PinAttributes } from "#schema/block-structure.ts";
import type { BlockResult, Settled } from "../evaluation/results-store.ts";

export type PinState =
  /** Its block has not been computed yet on this page: nothing is claimed. */
  | { readonly status: "waiting" }
  | { readonly status: "holds"; readonly label: string }
  | {
      readonly status: "moved";
      readonly label: string;
      readonly now: string;
      readonly settled: Settled | null;
    }
  | { readonly status: "loose"; readonly words: string };

const looseWords = {
  "block-gone": "its block is gone",
  "block-in-error": "its block is in error",
  "scalar-gone": "its block no longer gives this number",
} as const;

export function pinStateOf(
  pin: PinAttributes,
  blockExists: boolean,
  result: BlockResult,
  settled: Settled | null = null,
): PinState {
  if (blockExists && result.evaluation === null) return { status: "waiting" };
  const status = statusOf(pin, blockExists ? result.evaluation : null);
  switch (status.status) {
    case "holds":
      return { status: "holds", label: status.scalar.label };
    case "moved":
      return {
        status: "moved",
        label: status.now.label,
        now: formatScalar(status.now.value, parsePinFormat(pin.format)),
        settled,
      };
    case "loose":
      return { status: "loose", words: looseWords[status.why] };
  }
}

export function statusOf(pin: PinAttributes, evaluation: Evaluation | null): PinStatus {
  return pinStatus(pin, new Map(evaluation ? [[pin.blockId, evaluation]] : []));
}

/** "moved · Otto, 14:02"; the time with its date when it was not today. */
export function movedWords(settled: Settled | null, now: Date = new Date()): string {
  if (!settled) return "moved";
  const at = new Date(settled.at);
  if (Number.isNaN(at.getTime())) return "moved";
  const today = at.toDateString() === now.toDateString();
  const time = at.toLocaleTimeString("en-GB", { hour: "2-digit", minute: "2-digit" });
  const when = today ? time : `${at.toLocaleDateString("en-GB", { day: "numeric", month: "short" })} ${time}`;
  return settled.by === null ? `moved · ${when}` : `moved · ${settled.by}, ${when}`;
}
