/** Every template is a complete argument: all its blocks compute without a problem, and every pin holds. */
import { describe, expect, it } from "vitest";
import { evaluateNotebook, readDocument } from "#engine/index.ts";
import { templateNames, templateWords } from "#contract/templates.ts";
import { documentSchema } from "#schema/document-schema.ts";
import { pinsOf } from "../../server/commands/pin-maker.ts";
import { documentOf } from "../../server/commands/templates.ts";

const written = templateNames.filter((name) => name !== "blank");

function evaluated(name: (typeof written)[number]) {
  const { blocks, write } = documentOf(name);
  const document = write(pinsOf(blocks));
  const outcomes = evaluateNotebook(readDocument(document).blocks, {
    memo: new Map(),
    onInternalError: (error) => {
      throw error;
    },
  });
  return { document, outcomes };
}

describe.each(written)("the template %s", (name) => {
  it("fits the schema, has a value in every block, and no problem", () => {
    const { document, outcomes } = evaluated(name);
    documentSchema.nodeFromJSON(document).check();
    expect(outcomes.length).toBeGreaterThanOrEqual(3);
    for (const { blockId, evaluation } of outcomes) {
      expect(evaluation.problems, blockId).toEqual([]);
      expect(evaluation.value, blockId).not.toBeNull();
    }
  });

  it("is offered in words, and places every block it has", () => {
    const { blocks } = documentOf(name);
    const { document } = evaluated(name);
    const placed = (document.content ?? []).filter(({ attrs }) => attrs?.["blockId"] !== undefined);
    expect(placed).toEqual(blocks);
    expect(templateWords[name].label).not.toBe("");
    expect(templateWords[name].hint).not.toBe("");
  });
});

/** What the templates say they agree with; the sources stand in their texts. */
describe("numbers of the templates", () => {
  it.each([
    // Wilson and Kogut 1974, Phys. Rep. 12, 75: marginal in four and in three dimensions.
    ["scalar-pair", "lambda1/coefficient", { type: "exact", text: "-d + 4" }],
    ["scalar-pair", "six/coefficient", { type: "exact", text: "-2*d + 6" }],
    // Peskin and Schroeder 1995, section 10.1: the coupling of four fermions has dimension −2.
    ["contact-gauge", "g/coefficient", { type: "exact", text: "-2" }],
    ["contact-gauge", "e/class", { type: "word", text: "marginal" }],
    // Anselmi and Halat 2007, Phys. Rev. D 76, 125011: in D = 3, z = 2 the tenth power is the last one (from memory).
    ["lifshitz", "ten/class", { type: "word", text: "marginal" }],
    ["lifshitz", "twelve/class", { type: "word", text: "irrelevant" }],
    // Nishida and Son 2007, Phys. Rev. D 76, 086004: the dimer of dimension 2 couples with a marginal coupling.
    ["tern", "y/class", { type: "word", text: "marginal" }],
    ["tern", "r/coefficient", { type: "exact", text: "-1" }],
    // Weinberg 1990, Phys. Lett. B 251, 288: Δ = d + n/2 − 2.
    ["nucleons", "axial/order", { type: "exact", text: "0" }],
    ["nucleons", "contact2/order", { type: "exact", text: "2" }],
    // Lepage and others 1992, Phys. Rev. D 46, 4052.
    ["bound-state", "relativity/order", { type: "exact", text: "2" }],
    ["bound-state", "spin/order", { type: "exact", text: "2" }],
    ["bound-state", "kinetic/order", { type: "exact", text: "0" }],
    ["bound-state", "kinetic/class", { type: "word", text: "irrelevant" }],
    ["bound-state", "verdict", { type: "word", text: "not by dimension" }],
    // Kaplan, Savage and Wise 1998, Nucl. Phys. B 534, 329.
    ["large-scattering-length", "c0/order", { type: "exact", text: "0" }],
    ["large-scattering-length", "verdict", { type: "word", text: "not by dimension" }],
    // Henning, Lu, Melia, Murayama 2017, J. High Energy Phys. 08, 016.
    ["standard-model-count", "total/6", { type: "exact", text: "3045" }],
    ["standard-model-count", "total/8", { type: "exact", text: "44807" }],
  ] as const)("%s: %s", (name, scalarId, value) => {
    const found = evaluated(name).outcomes.flatMap(({ evaluation }) => evaluation.scalars);
    expect(found.find(({ id }) => id === scalarId)?.value).toEqual(value);
  });

  it.each([
    ["nucleons", ["0", "2", "3"]],
    ["large-scattering-length", ["-1", "0"]],
    ["gravity", ["2", "4", "4"]],
  ] as const)("%s: its graphs count %j", (name, orders) => {
    const found = evaluated(name).outcomes.flatMap(({ evaluation }) => evaluation.scalars);
    expect(found.flatMap(({ id, value }) => (id === "graph/order" ? [value] : []))).toEqual(
      orders.map((text) => ({ type: "exact", text })),
    );
  });

  it.each([
    ["contact-gauge", "2"],
    // A linear divergence into 1/a: that is what the tuning costs.
    ["tern", "1"],
    // One loop of two vertices of two derivatives each: four.
    ["gravity", "4"],
    // D + z − 4·(four propagator powers of two fields): below zero, so finite.
    ["lifshitz", "-3"],
  ] as const)("%s: its graph diverges with degree %s", (name, degree) => {
    const found = evaluated(name).outcomes.flatMap(({ evaluation }) => evaluation.scalars);
    expect(found.find(({ id }) => id === "omega")?.value).toEqual({ type: "exact", text: degree });
  });
});
