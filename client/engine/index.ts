/** The engine as server, worker and commands see it. Forms and documents need only `descriptions.ts`. */
export { ENGINE_VERSION, roundFloat } from "./evaluation.ts";
export type {
  Evaluation,
  InputPath,
  Notice,
  Problem,
  Scalar,
  ScalarValue,
  WorkingStep,
} from "./evaluation.ts";
export { aloneContext, kindNames } from "./kind.ts";
export type { BlockDescription, BlockKind, EvaluationContext, KindName, Progress, Source } from "./kind.ts";
export { kindDescriptions } from "./descriptions.ts";
export { kinds } from "./kinds.ts";
export { schemaOf } from "./shape.ts";
export type { InputsOf, Shape } from "./shape.ts";
export type { BlockInputs, BlockInstance, BlockRow, PinInstance } from "./notebook/block-instance.ts";
export { choosePremises } from "./notebook/choose-premises.ts";
export type { PremisesChoice } from "./notebook/choose-premises.ts";
export { evaluateNotebook } from "./notebook/evaluate-notebook.ts";
export type { EvaluateOptions, Memo, NotebookOutcome, Postponed } from "./notebook/evaluate-notebook.ts";
export { isLong, neededFor } from "./notebook/references.ts";
export { canonicalJson, resultKey } from "./notebook/keys.ts";
export type { Json } from "./notebook/keys.ts";
export {
  defaultPinFormat,
  formatScalar,
  formatScalarLatex,
  numberStyles,
  parsePinFormat,
  printPinFormat,
  signStyles,
} from "./notebook/pin-format.ts";
export type { PinFormat, SignStyle } from "./notebook/pin-format.ts";
export { isSameScalar, pinStatus, readPinValue } from "./notebook/pins.ts";
export type { PinStatus } from "./notebook/pins.ts";
export { readDocument } from "./notebook/read-document.ts";
export type { DocumentReading } from "./notebook/read-document.ts";
export { countPins, premisesLine } from "./notebook/summary.ts";
export type { PinCounts } from "./notebook/summary.ts";
