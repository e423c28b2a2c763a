/** Problems and notices of Basis count. */
import { quoted, said, type Words } from "./words.ts";

export const basisWords: Words = {
  "counted-dimension-unreadable": ({ text, most }) =>
    `${quoted(text)} is no dimension of spacetime that is counted: 4, or from 3 to ${said(most)} for scalars alone.`,
  "range-unreadable": ({ text }) =>
    `${quoted(text)} is no mass dimension. Give a whole number such as 6, or a half such as 13/2.`,
  "below-complete": ({ d }) =>
    `At and below dimension ${said(d)} the count would be wrong, since conserved currents and the like need corrections. Begin above ${said(d)}.`,
  "range-reversed": () => "The last dimension is below the first. Exchange them.",
  "range-too-high": ({ most }) => `Dimensions above ${said(most)} are not counted.`,
  "flavours-at-unreadable": ({ text }) =>
    `${quoted(text)} is no number of flavours. Give a whole number such as 3.`,
  "flavours-unreadable": ({ text, most }) =>
    `${quoted(text)} is no number of copies. Give a whole number up to ${said(most)}, or n_f.`,
  "nothing-to-count": () => "There are no fields to count with. Give at least one.",
  "parity-needs-scalars": () =>
    "Parity is imposed for scalars and pseudoscalars only, since it exchanges the two chiralities. Count without parity.",
  "count-too-large": ({ most }) =>
    `Up to this dimension there is more to count than fits into memory, such as more than ${said(most)} field contents. Lower the last dimension.`,
  "count-takes-long": ({ classes, minutes }) =>
    `There are ${said(classes)} field contents up to this dimension, which takes about ${Number(minutes) > 1 ? `${said(minutes)} minutes` : "a minute"}. To go on, allow it however long it takes.`,
  "group-not-known": ({ text }) =>
    `${quoted(text)} is no group that is counted. Use SU(N), U(1), Z_n, or O(N) for scalars.`,
  "group-size": ({ text, least, most }) =>
    `${quoted(text)} is out of range: between ${said(least)} and ${said(most)} is counted.`,
  "kept-unreadable": ({ text }) =>
    `${quoted(text)} is no list of charges. Leave it empty for neutral operators, or write “all”, or numbers such as “1, -1”.`,
  "fields-too-many": ({ most }) => `At most ${said(most)} fields are counted.`,
  "counted-symbol-unreadable": ({ text }) =>
    `${quoted(text)} is no symbol. Use one letter, with a subscript if need be.`,
  "counted-symbol-twice": ({ text }) => `${quoted(text)} names another field already. Choose another symbol.`,
  "spin-needs-four-dimensions": ({ kind, d }) =>
    `A ${said(kind)} is counted in d = 4 only, not in d = ${said(d)}. Set d to 4, or use scalars.`,
  "counted-charges-too-many": ({ count, groups }) =>
    `There are ${said(count)} charges for ${said(groups)} groups. Give one for each group, in the order of their table.`,
  "representation-not-known": ({ text, group }) =>
    `${said(group)} has no representation ${quoted(text)}. Give its dimension, such as 3 or 3bar, “adj”, “vector”, or Dynkin labels in brackets.`,
  "charge-not-a-number": ({ text, name }) =>
    `${quoted(text)} is no charge under ${quoted(name)}. Give a number such as 1/6.`,
  "real-field-in-complex-representation": ({ symbol, kind }) =>
    `${quoted(symbol)} is a ${said(kind)}, which is its own conjugate, but these charges are not. Use a complex field or neutral charges.`,
  "anomalous-content": ({ anomalies }) =>
    `The fermions are anomalous (${said(anomalies)}). If these groups are gauged, there is no such theory; if they are global, never mind.`,
  "everything-vanishes": () =>
    "No operator in this range is invariant: look at the charges and at the range.",
  "count-is-of-real-parameters": () =>
    "Numbers are of real parameters: an operator and its Hermitian conjugate count as two. A count is no list of operators.",
};
