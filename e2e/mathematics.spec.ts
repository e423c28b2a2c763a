/** Mathematics is typed as LaTeX, drawn as one types, and explained when it is wrong; by keyboard throughout. */
import type { Page } from "playwright/test";
import { isSaved, makeNotebook, prose } from "./notebook.ts";
import { test, expect } from "./stage.ts";

/** KaTeX gives every formula a second form in MathML, whose annotation is its source. */
const drawn = (page: Page, latex: string) =>
  prose(page)
    .locator(".katex")
    .filter({ has: page.locator("annotation", { hasText: latex }) });
const source = (page: Page) => page.getByRole("textbox", { name: "LaTeX" });

test("$…$ becomes a drawn formula, and a price stays a price", async ({ enter }) => {
  const { page } = await enter("wren-lantern");
  await makeNotebook(page, "Inline mathematics");
  await prose(page).focus();
  await page.keyboard.type("The ratio $p/\\Lambda$ is small; it costs between $5 and $7 to print.");
  await expect(drawn(page, "p/\\Lambda")).toBeVisible();
  await expect(prose(page).locator(".katex")).toHaveCount(1);
  await expect(prose(page)).toContainText("is small; it costs between $5 and $7 to print.");
  // Drawn with the faces that we ship, not only marked up.
  const face = await drawn(page, "p/\\Lambda").evaluate((element) => getComputedStyle(element).fontFamily);
  expect(face).toContain("KaTeX");
  await isSaved(page);
  await page.reload();
  await expect(drawn(page, "p/\\Lambda")).toBeVisible();

  await test.step("arrow keys go into it, Enter opens it, Enter keeps the change", async () => {
    await prose(page).focus();
    await page.keyboard.press("Control+Home");
    for (const _ of "The ratio ") await page.keyboard.press("ArrowRight");
    await page.keyboard.press("ArrowRight");
    await page.keyboard.press("Enter");
    await expect(source(page)).toHaveValue("p/\\Lambda");
    await page.keyboard.type("^2");
    await page.keyboard.press("Enter");
    await expect(source(page)).toHaveCount(0);
    await expect(drawn(page, "p/\\Lambda^2")).toBeVisible();
    await page.keyboard.type("!");
    await expect(prose(page)).toContainText("! is small");
  });
});

test("$$ opens a displayed equation that draws as one types, completes symbols and is numbered", async ({
  enter,
}) => {
  const { page } = await enter("wren-lantern");
  await makeNotebook(page, "Displayed mathematics");
  await prose(page).focus();
  await page.keyboard.type("The beta function is $$");
  const editor = page.getByRole("dialog", { name: "Displayed equation" });
  await expect(source(page)).toBeFocused();
  await page.keyboard.type("\\be");
  const symbols = editor.getByRole("listbox", { name: "Symbols" });
  await expect(symbols.getByRole("option", { selected: true })).toContainText("\\beta");
  await page.keyboard.press("Tab");
  await expect(source(page)).toHaveValue("\\beta");
  await page.keyboard.type(" = \\fra");
  await expect(symbols.getByRole("option", { selected: true })).toContainText("\\frac");
  await page.keyboard.press("Tab");
  await page.keyboard.type("3");
  await expect(source(page)).toHaveValue(/^\\beta = \\frac\{3\}\{/);
  await page.keyboard.press("End");
  await page.keyboard.press("Control+a");
  await page.keyboard.type("\\beta = \\frac{3 \\lambda^2}{16 \\pi^2}");
  await expect(editor.locator(".katex annotation")).toHaveText("\\beta = \\frac{3 \\lambda^2}{16 \\pi^2}");
  await page.keyboard.press("Enter");
  await expect(editor).toHaveCount(0);
  await expect(drawn(page, "\\beta = \\frac{3 \\lambda^2}{16 \\pi^2}")).toBeVisible();
  await expect(prose(page).locator(".katex-display")).toHaveCount(1);

  await test.step("writing goes on below it", async () => {
    await page.keyboard.press("ArrowDown");
    await page.keyboard.type("It grows.");
    await expect(prose(page).getByText("It grows.")).toBeVisible();
  });
});

test("what is wrong is said in words and where; Escape leaves what was there", async ({ enter }) => {
  const { page } = await enter("wren-lantern");
  await makeNotebook(page, "Mathematics with mistakes");
  await prose(page).focus();
  await page.keyboard.type("See $$");
  const editor = page.getByRole("dialog", { name: "Displayed equation" });
  const fault = editor.getByRole("status");
  for (const [typed, words] of [
    ["\\frac{1}{2", /never closed|not closed/],
    ["a^b^c", /Two superscripts follow each other/],
    ["\\notacommand x", /\\notacommand is not a command known here/],
    ["x }", /one \} too many/],
  ] as const) {
    await source(page).fill(typed);
    await expect(fault).toContainText(words);
    await expect(source(page)).toHaveAttribute("aria-invalid", "true");
  }
  await source(page).fill("a^b");
  await expect(source(page)).toHaveAttribute("aria-invalid", "false");
  await expect(fault).toHaveCount(0);
  await expect(editor.locator(".katex annotation")).toHaveText("a^b");
  await page.keyboard.press("Enter");
  await expect(drawn(page, "a^b")).toBeVisible();

  // Writing goes on below; the arrow key goes back to the equation.
  await page.keyboard.press("ArrowUp");
  await page.keyboard.press("Enter");
  await expect(source(page)).toHaveValue("a^b");
  await page.keyboard.type("^c");
  await expect(fault).toContainText("Two superscripts");
  await page.keyboard.press("Escape");
  await expect(editor).toHaveCount(0);
  await expect(drawn(page, "a^b")).toBeVisible();

  // Bad input typed between dollars is kept as typed and explained where it stands.
  await page.keyboard.press("ArrowDown");
  await page.keyboard.type("Then $\\nonsense$ stands.");
  await expect(prose(page).getByTitle(/\\nonsense is not a command known here/)).toHaveText("\\nonsense");
});
