import { describe, expect, it } from "vitest";
import {
  defaultPinFormat,
  evaluateNotebook,
  formatScalar,
  printPinFormat,
  readDocument,
} from "#engine/index.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { excerptBlocks, excerptDocument, excerptPins } from "../../../client/pages/home/excerpt-document.ts";

const outcomes = evaluateNotebook(readDocument({ type: "doc", content: [...excerptBlocks] }).blocks, {
  memo: new Map(),
  onInternalError: (error) => {
    throw error;
  },
});

describe("the excerpt on the first page", () => {
  it("is a document of the schema", () => {
    expect(() => {
      documentSchema.nodeFromJSON(excerptDocument).check();
    }).not.toThrow();
  });

  it("has blocks without a problem", () => {
    expect(outcomes.flatMap(({ evaluation }) => evaluation.problems)).toEqual([]);
  });

  it.each(excerptPins)("pins $scalar at the value the engine gives", (pin) => {
    const outcome = outcomes.find(({ blockId }) => blockId === pin.blockId);
    const scalar = outcome?.evaluation.scalars.find(({ id }) => id === pin.scalar);
    expect(outcome?.key).toBe(pin.resultKey);
    expect(scalar && JSON.stringify(scalar.value)).toBe(pin.value);
    expect(scalar && formatScalar(scalar.value, defaultPinFormat)).toBe(pin.text);
    expect(pin.format).toBe(printPinFormat(defaultPinFormat));
  });

  // p/Λ = 350 GeV / 3.2 TeV = 0.109375, relative error 0.4/3.2 = 1/8; to the fourth power 1.4311e-4 with four times
  // that relative error (own derivation: first-order propagation of one uncertain scale).
  it("agrees with the ratio of its scales worked out by hand", () => {
    const [ratio, firstLeftOut] = excerptPins.map(
      ({ value }) => JSON.parse(value) as { value: number; sigma: number },
    ); // Written above.
    expect(ratio?.value).toBeCloseTo(350 / 3200, 12);
    expect(ratio?.sigma).toBeCloseTo(350 / 3200 / 8, 12);
    expect(firstLeftOut?.value).toBeCloseTo((350 / 3200) ** 4, 12);
    expect(firstLeftOut?.sigma).toBeCloseTo((350 / 3200) ** 4 / 2, 12);
  });
});
