/** What the Data block is and takes, without its computation. */
import type { BlockDescription } from "../kind.ts";
import { dataShape } from "./inputs.ts";

export const dataDescription: BlockDescription<typeof dataShape> = {
  kind: "data",
  title: "Data",
  purpose: "Keep a table of predictions or measurements that other blocks compute from.",
  shape: dataShape,
  premises: "none",
};
