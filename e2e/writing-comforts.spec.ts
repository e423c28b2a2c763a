/** What makes a long notebook easy to live in: finding, renaming, files, copies, and taking a deletion back. */
import { readFileSync } from "node:fs";
import { block, isSaved, makeNotebook, prose } from "./notebook.ts";
import { evaluateFile } from "../server/compute/evaluate-file.ts";
import { expect, test } from "./stage.ts";

test("a notebook is searched, a symbol renamed, its blocks go to a file and back, and a deletion is taken back", async ({
  enter,
}) => {
  const { page } = await enter("ines-tern");
  const address = await makeNotebook(page, "A long one", "A copy of the Lantern demonstration");
  const actions = page.getByRole("button", { name: "Actions for this notebook" });

  await test.step("find", async () => {
    await prose(page).focus();
    await page.keyboard.press("Control+;");
    const field = page.getByRole("textbox", { name: "Find in the notebook" });
    await expect(field).toBeFocused();
    await page.keyboard.type("lambda/4");
    await expect(page.getByText("1 of 1", { exact: true })).toBeVisible();
    await page.keyboard.press("Escape");
    await expect(field).toHaveCount(0);
    // The caret goes where it was found: into the entry of the block.
    await expect(block(page, "Premises").getByLabel("term, as typed of term 4")).toBeFocused();
  });

  await test.step("rename a field where it is used", async () => {
    const symbol = block(page, "Premises").getByLabel("symbol of field 1", { exact: true });
    await symbol.fill("omega");
    await symbol.press("Tab");
    await page.getByRole("button", { name: "rename it there too" }).click();
    await expect(block(page, "Premises").getByLabel("term, as typed of term 4")).toHaveValue(
      "lambda/4! omega^4",
    );
    await expect(block(page, "Divergence").getByText("agrees")).toBeVisible();
    await isSaved(page);
  });

  await test.step("the blocks as the file that evaluate reads, and back into the notebook", async () => {
    await actions.click();
    const [file] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("menuitem", { name: "Download the blocks" }).click(),
    ]);
    expect(file.suggestedFilename()).toBe("A long one blocks.json");
    const path = await file.path();
    const outcome = evaluateFile(JSON.parse(readFileSync(path, "utf8")), (error) => {
      throw error;
    });
    expect(outcome.ok).toBe(true);
    await actions.click();
    await page.getByRole("menuitem", { name: "Open a file of blocks" }).click();
    await page.getByLabel("File", { exact: true }).setInputFiles(path);
    await page.getByRole("button", { name: "Add to the notebook" }).click();
    await expect(block(page, "Premises")).toHaveCount(2);
    await prose(page).focus();
    await page.keyboard.press("Control+z");
    await expect(block(page, "Premises")).toHaveCount(1);
  });

  await test.step("a copy, and a deletion that is taken back", async () => {
    await isSaved(page);
    await actions.click();
    await page.getByRole("menuitem", { name: "Duplicate" }).click();
    await page.waitForURL((url) => !address.endsWith(url.pathname) && url.pathname.startsWith("/notebooks/"));
    await expect(block(page, "Premises").getByLabel("symbol of field 1", { exact: true })).toHaveValue(
      "omega",
    );
    await page.goto(new URL("/shelf", address).href);
    await page.getByRole("button", { name: "Actions for “Copy of A long one”" }).click();
    await page.getByRole("menuitem", { name: "Delete" }).click();
    await page.getByRole("button", { name: "Delete the notebook" }).click();
    await expect(page.getByRole("link", { name: "Copy of A long one" })).toHaveCount(0);
    await page.getByLabel("Show").selectOption("deleted");
    await page.getByRole("button", { name: "Bring back “Copy of A long one”" }).click();
    await page.getByLabel("Show").selectOption("current");
    await expect(page.getByRole("link", { name: "Copy of A long one" })).toBeVisible();
  });
});
