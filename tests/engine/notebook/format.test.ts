import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { evaluateFile, EVALUATE_FORMAT, RESULTS_FORMAT } from "#contract/evaluate-file.ts";
import type { Evaluation } from "#engine/evaluation.ts";
import { kindNames, type KindName } from "#engine/kind.ts";
import { kindDescriptions } from "#engine/descriptions.ts";
import { evaluateNotebook } from "#engine/notebook/evaluate-notebook.ts";
import { schemaOf } from "#engine/shape.ts";
import type { BlockInputs } from "#engine/notebook/block-instance.ts";

const format = readFileSync(join(import.meta.dirname, "../../../client/engine/notebook/FORMAT.md"), "utf8");
const examples = [
  ...format.matchAll(/^## (?<heading>.+)\n(?:(?!^## )[\s\S])*?```json\n(?<json>[\s\S]*?)```/gm),
].map((found) => ({
  heading: found.groups?.["heading"] ?? "",
  json: found.groups?.["json"] ?? "",
}));

interface Row {
  readonly id?: string;
}
/** Evaluates an example by the schemas of the format; rows without an id are named by table and place, as the format says. */
function evaluateExample(json: string): { kind: KindName; evaluation: Evaluation }[] {
  const { blocks } = evaluateFile.parse(JSON.parse(json));
  const instances = blocks.map(({ id, kind, standsOn, inputs }) => {
    const complete = Object.entries(inputs).map(([name, value]) => [
      name,
      Array.isArray(value)
        ? (value as Row[]).map((row, index) => ({ id: `${name}${index + 1}`, ...row }))
        : value,
    ]);
    const read = schemaOf(kindDescriptions[kind].shape).parse(
      Object.fromEntries(complete),
    ) as unknown as BlockInputs;
    return { id, kind, standsOn: standsOn ?? null, inputs: read, title: "", problems: [] };
  });
  return evaluateNotebook(instances, {
    memo: new Map(),
    onInternalError: (error) => {
      throw error;
    },
  });
}

describe("the documented file format", () => {
  it("has an example of every kind of block", () => {
    expect(examples.map(({ heading }) => heading).sort()).toEqual(
      kindNames.map((name) => kindDescriptions[name].title).sort(),
    );
  });

  it.each(examples)("computes its example of $heading without a problem", ({ json }) => {
    for (const { kind, evaluation } of evaluateExample(json)) {
      expect({ kind, problems: evaluation.problems }).toEqual({ kind, problems: [] });
      expect(evaluation.value).not.toBeNull();
      expect(evaluation.scalars.length).toBeGreaterThan(0);
      expect(evaluation.working.length).toBeGreaterThan(0);
    }
  });

  it("names scalars that its examples have", () => {
    const outcomes = examples.flatMap(({ json }) => evaluateExample(json));
    const table = format.slice(format.indexOf("## Scalars by kind"));
    for (const name of kindNames) {
      const line = table.split("\n").find((candidate) => candidate.startsWith(`| ${name} `)) ?? "";
      const listed = [...line.matchAll(/`([^`]+)`/g)].map(([, id]) => id);
      const ids = new Set(
        outcomes
          .filter(({ kind }) => kind === name)
          .flatMap(({ evaluation }) => evaluation.scalars.map(({ id }) => id)),
      );
      expect(listed.length, name).toBeGreaterThan(0);
      expect(
        listed.filter((id) => !ids.has(id ?? "")),
        name,
      ).toEqual([]);
    }
  });

  it("states the names of the formats and kinds as they are", () => {
    expect(format).toContain(`"${EVALUATE_FORMAT}"`);
    expect(format).toContain(`"${RESULTS_FORMAT}"`);
    for (const kind of kindNames) expect(format).toContain(`\`${kind}\``);
  });
});
