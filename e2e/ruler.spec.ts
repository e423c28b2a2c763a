/** The order ruler: what one tries on it is one's own, what one keeps is everybody's. */
import { invite, isSaved, makeNotebook, openNotebook } from "./notebook.ts";
import { expect, test } from "./stage.ts";

test("moves the probe and the target, keeps them for both, and takes them back", async ({ enter }) => {
  const otto = await enter("otto-lantern");
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "On the ruler", "A copy of the Lantern demonstration");
  await invite(wren.page, notebook, "otto-lantern");
  await openNotebook(otto.page, notebook);
  const ruler = (page: typeof wren.page) => page.getByRole("region", { name: "Order ruler" });
  const [hers, his] = [ruler(wren.page), ruler(otto.page)];
  const [probe, target] = [
    hers.getByRole("slider", { name: "Probe scale p" }),
    hers.getByRole("slider", { name: "Target accuracy" }),
  ];
  await expect(probe).toHaveAttribute(
    "aria-valuetext",
    /^350 GeV, through order 3, first left out .*size 1\.4/,
  );

  // By keyboard: spoken with every step, and nothing of it reaches a colleague.
  await probe.focus();
  await wren.page.keyboard.press("PageDown");
  await expect(probe).toHaveAttribute("aria-valuetext", /^280 GeV, through order 3/);
  await expect(his.getByRole("slider", { name: "Probe scale p" })).toHaveAttribute(
    "aria-valuetext",
    /^350 GeV/,
  );
  await wren.page.keyboard.press("Escape");
  await expect(probe).toHaveAttribute("aria-valuetext", /^350 GeV/);

  // By mouse.
  const box = await hers.locator(".ruler-grip").boundingBox();
  if (!box) throw new Error("the hairline has a grip");
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await wren.page.mouse.move(x, y);
  await wren.page.mouse.down();
  await wren.page.mouse.move(x + 60, y, { steps: 5 });
  await wren.page.mouse.up();
  await expect(target).not.toHaveAttribute("aria-valuetext", /^target 10⁻³/);
  await probe.focus();
  await wren.page.keyboard.press("PageDown");
  await hers.getByRole("button", { name: /^keep in the premises: 280 GeV and target / }).click();
  await isSaved(wren.page);
  await expect(his.getByRole("slider", { name: "Probe scale p" })).toHaveAttribute(
    "aria-valuetext",
    /^280 GeV/,
  );
  await expect(his.getByText("p = 280 GeV")).toBeVisible();

  // One step of the history, the probe and the target together.
  await probe.focus();
  await wren.page.keyboard.press("Control+z");
  await expect(probe).toHaveAttribute("aria-valuetext", /^350 GeV/);
  await expect(target).toHaveAttribute("aria-valuetext", /^target 10⁻³/);

  // From a tick to its row, and to the sentence that relies on it.
  await hers.getByRole("button", { name: /^c₆.*irrelevant/ }).click();
  const panel = hers.getByRole("group", { name: /where it stands/ });
  await panel.getByRole("button", { name: /sextic term enters at/ }).click();
  await expect(wren.page.locator("p", { hasText: "the sextic term enters at" })).toBeInViewport();
  await panel.getByRole("button", { name: "its row in the premises" }).click();
  await expect(wren.page.locator('[data-row="c6"]')).toBeInViewport();
  const saving = wren.page.waitForEvent("download");
  await panel.getByRole("button", { name: "close" }).click();
  await hers.getByRole("button", { name: "Save the ruler as SVG" }).click();
  expect((await saving).suggestedFilename()).toMatch(/order ruler\.svg$/);
});
