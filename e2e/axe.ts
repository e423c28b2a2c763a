/** Looks a page over with axe-core, as assistive technology would meet it, in both themes and at several widths. */
import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { expect, type Page } from "playwright/test";

const source = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

interface Finding {
  readonly rule: string;
  readonly impact: string;
  readonly help: string;
  readonly places: readonly string[];
}
interface Sight {
  readonly width: number;
  readonly theme: "light" | "dark";
}
export const sights: readonly Sight[] = [1440, 390].flatMap((width) => [
  { width, theme: "light" } as const,
  { width, theme: "dark" } as const,
]);
/** Nothing may make the page itself scroll sideways here: a phone, and half a wide screen. */
const narrowWidths = [390, 1024];
const HEIGHT = 900;

/** Each width and each theme once: for large pages, which take long to look over. */
export const twoSights: readonly Sight[] = [
  { width: 1440, theme: "light" },
  { width: 390, theme: "dark" },
];

/** One line for each finding, however small; those that fail a story begin with their impact. */
export async function lookOver(page: Page, screen: string, from = sights): Promise<readonly string[]> {
  const lines: string[] = [];
  for (const { width, theme } of from) {
    await page.setViewportSize({ width, height: HEIGHT });
    await page.emulateMedia({ colorScheme: theme, reducedMotion: "reduce" });
    for (const { rule, impact, help, places } of await findingsOn(page)) {
      lines.push(`${impact}: ${screen}, ${width} px, ${theme}: ${rule} (${help}) at ${places.join(" | ")}`);
    }
  }
  for (const width of narrowWidths) {
    await page.setViewportSize({ width, height: HEIGHT });
    const excess = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    if (excess > 0) lines.push(`serious: ${screen} scrolls ${excess} px sideways at ${width} px`);
  }
  await page.setViewportSize({ width: 1440, height: HEIGHT });
  await page.emulateMedia({ colorScheme: "light", reducedMotion: "reduce" });
  return lines;
}

/** Fails with every finding in the message when one of them is serious. */
export function expectSound(lines: readonly string[]): void {
  const grave = lines.filter((line) => /^(serious|critical)/.test(line));
  expect(grave, `all findings:\n${lines.join("\n")}\n`).toEqual([]);
}

async function findingsOn(page: Page): Promise<readonly Finding[]> {
  // Through the debugger: the page's own policy lets no foreign script in.
  await page.evaluate(source);
  return await page.evaluate(async () => {
    interface Violation {
      readonly id: string;
      readonly impact: string | null;
      readonly help: string;
      readonly nodes: readonly { readonly target: readonly unknown[]; readonly html: string }[];
    }
    // The script above has put it there.
    const { axe } = window as unknown as {
      readonly axe: { run(): Promise<{ readonly violations: readonly Violation[] }> };
    };
    const { violations } = await axe.run();
    return violations.map(({ id, impact, help, nodes }) => ({
      rule: id,
      impact: impact ?? "unrated",
      help,
      places: nodes.slice(0, 4).map(({ target, html }) => `${target.join(" ")} ${html.slice(0, 160)}`),
    }));
  });
}
