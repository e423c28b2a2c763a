/** The screens of the larger blocks, and the page of parts: nothing serious for assistive technology, in both themes. */
import { expectSound, lookOver, twoSights } from "./axe.ts";
import { addRow, block, fillField, goToShelf, makeNotebook, placeAtEnd } from "./notebook.ts";
import { test, expect } from "./stage.ts";

test("counts of operators by dimension and by field content", async ({ enter }) => {
  test.slow();
  const { page } = await enter("wren-lantern");
  await makeNotebook(page, "Counted", "Operators of the Standard Model");
  const counts = block(page, "Basis count").first();
  await counts.getByText(/^by field content/).click();
  await expect(counts.getByRole("searchbox", { name: "search" })).toBeVisible();
  expectSound(await lookOver(page, "counts of operators", twoSights));
});

test("a table that is read in, and a budget", async ({ enter }) => {
  test.slow();
  const { page } = await enter("otto-lantern");
  await goToShelf(page);
  await makeNotebook(page, "Tables");
  const data = await placeAtEnd(page, "Data");
  await data.getByRole("button", { name: "read in a table" }).click();
  await page.getByLabel("or paste it here").fill("p [MeV],LO,NLO\n60,10.2,11.0\n120,8.1,9.0");
  await expect(page.getByRole("button", { name: "Read it in" })).toBeEnabled();
  const found = [...(await lookOver(page, "reading in a table", twoSights))];
  await page.getByRole("button", { name: "Read it in" }).click();
  await expect(data.getByText("agrees")).toBeVisible();
  const budget = await placeAtEnd(page, "Error budget");
  await addRow(page, budget, "source", ["source", "omitted orders"], { size: "0.012" });
  await expect(budget.getByText("agrees")).toBeVisible();
  found.push(...(await lookOver(page, "a table and a budget", twoSights)));
  expectSound(found);
});

test("a closed set of operators, rules of counting, and running couplings", async ({ enter }) => {
  test.slow();
  const { page } = await enter("ines-tern");
  await makeNotebook(page, "Counted by rules", "Quartic and sextic scalar pair");
  await fillField(block(page, "Premises"), "spacetime dimension d", "4");
  const closure = await placeAtEnd(page, "Closure");
  await fillField(closure, "up to order in 1/Λ", "0");
  await expect(closure.getByRole("table").first()).toBeVisible();
  const counting = await placeAtEnd(page, "Counting rules");
  await expect(counting.getByText("This counting is")).toBeVisible();
  await counting.getByRole("button", { name: "edit these rules" }).click();
  await expect(counting.getByLabel("exponent of rule 1", { exact: true })).toBeVisible();
  const running = await placeAtEnd(page, "Running");
  await expect(running.getByRole("table").first()).toBeVisible();
  expectSound(await lookOver(page, "closure, counting rules and running", twoSights));
});

test("the page of parts", async ({ visit, stack }) => {
  test.slow();
  const page = await visit();
  await page.goto(`${stack.url}/parts`);
  await expect(page.getByRole("heading", { level: 1 })).toBeVisible();
  expectSound(await lookOver(page, "parts", twoSights));
});
