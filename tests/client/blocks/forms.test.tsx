import { cleanup, waitFor } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { kindDescriptions } from "#engine/descriptions.ts";
import { kindNames } from "#engine/kind.ts";
import { documentOf, personAtForms, type PersonAtForms } from "./people-at-forms.tsx";
import { row } from "./two-editors.ts";

let wren: PersonAtForms | null = null;
afterEach(() => {
  wren?.leave();
  wren = null;
  cleanup();
});

const lantern = {
  type: "premises",
  attrs: { blockId: "lantern", name: "Lantern" },
  content: [
    row("fields", "f1", "B", { symbol: "chi", kind: "real scalar", dimension: "", charges: "", meaning: "" }),
    row("scales", "s1", "B", { symbol: "Lambda", value: "3.2(4) TeV", role: "heavy", meaning: "" }),
    row("scales", "s2", "C", { symbol: "p", value: "350 GeV", role: "probe", meaning: "" }),
    row("terms", "t1", "B", { term: "lambda/4! chi^4", natural: "", assigned: "", meaning: "" }),
    row("terms", "t2", "C", { term: "c/Lambda^2 chi^6", natural: "", assigned: "", meaning: "" }),
  ],
};

function places(): string[] {
  return [...document.querySelectorAll<HTMLElement>("[data-kind]")].flatMap((block) =>
    [...block.querySelectorAll<HTMLElement>("[data-place]")].map(
      (field) => `${block.dataset["kind"] ?? ""}: ${field.dataset["place"] ?? ""}`,
    ),
  );
}

/** The code of some forms comes when the first one is drawn. */
async function formsAreThere() {
  await waitFor(() => {
    expect(document.querySelectorAll("[data-kind]").length).toBeGreaterThan(0);
    expect(document.querySelectorAll(".block-awaited")).toHaveLength(0);
  });
}

/** Written by reading in a file, and by nobody's hand. */
const unTyped: Readonly<Record<string, readonly string[]>> = { data: ["original", "lastImport"] };

describe.each(kindNames)("the form of %s", (kind) => {
  const { shape } = kindDescriptions[kind];
  const variants: Record<string, Record<string, string>[]> = {
    premises: [{ geometry: "isotropic" }, { geometry: "anisotropic" }],
    divergence: [{ mode: "one graph" }, { mode: "whole theory" }],
    scaling: [{ fixedPoint: "gaussian" }],
    running: [{ about: "running between two scales" }, { about: "fixed points in 4 − ε dimensions" }],
  };
  it("has a control for every field and column of its shape, and for nothing else", async () => {
    const seen = new Set<string>();
    for (const attrs of variants[kind] ?? [{}]) {
      const rows = Object.entries(shape.tables).map(([table, columns]) =>
        row(
          table,
          `${table}-1`,
          "K",
          Object.fromEntries(Object.entries(columns).map(([column, spec]) => [column, spec.initial])),
        ),
      );
      wren = personAtForms(
        "Wren",
        10,
        documentOf([{ type: kind, attrs: { blockId: "b", ...attrs }, content: rows }]),
        ["b"],
      );
      await formsAreThere();
      for (const place of places()) seen.add(place.replace(/^.*: /, "").replace(/\/[^/]+\//, "/"));
      wren.leave();
      wren = null;
      cleanup();
    }
    const wanted = [
      ...Object.keys(shape.fields).filter((field) => !(unTyped[kind] ?? []).includes(field)),
      ...Object.entries(shape.tables).flatMap(([table, columns]) =>
        Object.keys(columns).map((column) => `${table}/${column}`),
      ),
    ];
    expect([...seen].sort()).toEqual([...wanted].sort());
  });

  it("gives every control a name", async () => {
    wren = personAtForms("Wren", 10, documentOf([lantern, { type: kind, attrs: { blockId: "b" } }]), ["b"]);
    await formsAreThere();
    for (const control of document.querySelectorAll<HTMLInputElement>("input, select")) {
      const name = control.getAttribute("aria-label") ?? control.labels?.[0]?.textContent ?? "";
      expect(name, control.outerHTML).not.toBe("");
    }
  });
});

describe("blocks on premises", () => {
  const content = [
    lantern,
    { type: "scaling", attrs: { blockId: "scaling" } },
    { type: "orderPlan", attrs: { blockId: "plan", target: "10 %" } },
    {
      type: "divergence",
      attrs: { blockId: "graph" },
      content: [
        row("vertices", "v", "K", { term: "t1", count: "2" }),
        row("legs", "l", "K", { field: "chi", leg: "field", count: "4" }),
      ],
    },
    { type: "divergence", attrs: { blockId: "theory", mode: "whole theory" } },
    {
      type: "truncationError",
      attrs: { blockId: "truncation", q: "p/Lambda" },
      content: ["8.0", "9.1", "9.32"].map((value, index) =>
        row("orders", `o${index}`, `K${index}V`, { order: String(index), value, name: "" }),
      ),
    },
  ];
  const ids = ["lantern", "scaling", "plan", "graph", "theory", "truncation"];

  it("draw their results, with a figure to pin for every scalar they show", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ids);
    const { world } = wren;
    await waitFor(() => expect(ids.filter((id) => world.results.result(id).evaluation === null)).toEqual([]));
    await waitFor(() => expect(document.querySelectorAll(".block-state-computing")).toHaveLength(0));
    expect(document.querySelectorAll(".block-problems")).toHaveLength(0);
    for (const id of ids) expect(world.results.result(id).evaluation?.problems, id).toEqual([]);
    // Every figure on the page names a scalar of its block.
    const kinds = [...document.querySelectorAll<HTMLElement>("[data-kind]")];
    for (const [index, id] of ids.entries()) {
      const scalars = new Set(world.results.result(id).evaluation?.scalars.map((scalar) => scalar.id));
      const figures = [...(kinds[index]?.querySelectorAll<HTMLElement>("[data-figure]") ?? [])].map(
        (figure) => figure.dataset["figure"] ?? "",
      );
      expect(
        figures.filter((figure) => !scalars.has(figure)),
        id,
      ).toEqual([]);
      expect(figures.length, id).toBeGreaterThan(0);
    }
    const { screen } = wren;
    await waitFor(
      () =>
        expect(screen.getAllByRole("img", { name: /against the probe scale|order by order/ })).toHaveLength(
          3,
        ),
      {
        timeout: 10_000,
      },
    );
  });

  it("keep their inputs and show the last good result while they are in error", async () => {
    wren = personAtForms("Wren", 10, documentOf(content), ["truncation"]);
    const { screen, world, user } = wren;
    await waitFor(() => expect(world.results.result("truncation").evaluation?.value).not.toBeNull());
    await screen.findByText("agrees");
    const q = screen.getByLabelText("expansion parameter Q");
    await user.clear(q);
    await user.type(q, "wide");
    await user.tab();
    await screen.findByText("in error: shows its last good result");
    await waitFor(() =>
      expect(document.querySelector(".block-problems")?.textContent).toMatch(/“wide” .* is declared nowhere/),
    );
    expect(document.querySelector(".block-outcome-stale")).not.toBeNull();
    await user.clear(q);
    await user.type(q, "0.2");
    await user.tab();
    await screen.findByText("agrees");
  });
});
