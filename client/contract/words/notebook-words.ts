/** Problems that come before any kind computes. */
import { quoted, said, type Words } from "./words.ts";

export const notebookWords: Words = {
  internal: () =>
    "This could not be computed because of a mistake in the program, not in the inputs. They are kept.",
  "choice-unknown": ({ text, choices }, path) =>
    `${quoted(text)} is no choice for ${path.at(-1) ?? "this field"}. Choose one of: ${said(choices)}.`,
  "rows-too-many": ({ count, most }, path) =>
    `The table of ${path[0] ?? "rows"} has ${said(count)} rows; at most ${said(most)} are computed.`,
  "premises-missing": () => "This block needs premises, and there are none. Add a Premises block.",
  "premises-ambiguous": ({ count }) =>
    `There are ${said(count)} Premises blocks. Choose the one this block stands on.`,
  "premises-deleted": () =>
    "The premises this block stood on are no longer there. Choose others, or bring them back.",
  "premises-other-kind": () => "What this block is to stand on is not a Premises block. Choose one that is.",
  "premises-broken": () => "The premises this block stands on cannot be read. Correct them first.",
  "reference-deleted": () =>
    "The block this is taken from is no longer there. Choose another, or bring it back.",
  "reference-other-kind": () => "This cannot be taken from a block of that kind. Choose another.",
  "reference-circle": () =>
    "This block and the one it is taken from depend on each other. Break the circle in one of them.",
  "reference-broken": () => "The block this is taken from is in error. Correct it first.",
};
