/** Problems and notices of Data. */
import { quoted, said, type Words } from "./words.ts";

export const dataWords: Words = {
  "data-empty": () => "There is no table yet. Name its columns and type lines, or read in a file.",
  "data-order-unreadable": ({ text }) => `${quoted(text)} is no order. Give a whole number such as 2.`,
  "data-role-twice": ({ what }) => `Two columns are ${said(what)}. Keep one of them.`,
  "data-line-too-long": ({ line, count, columns }) =>
    `Line ${said(line)} has ${said(count)} values for ${said(columns)} columns; those beyond are left out.`,
  "data-value-unreadable": ({ text, line, column }) =>
    `Line ${said(line)}, column ${said(column)}: ${quoted(text)} is no number. Write decimals with a point, such as 1.25e-3.`,
  "data-more-unreadable": ({ count }) => `And ${said(count)} more values that cannot be read.`,
  "data-without-x": () => "No column is x, so nothing can be computed along it. Give one the role x.",
  "data-cut": ({ most }) => `Only the first ${said(most)} lines are used.`,
};
