import { readFileSync } from "node:fs";
import { join } from "node:path";
import { runInNewContext } from "node:vm";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import {
  chooseTheme,
  followTheme,
  readThemeChoice,
  THEME_KEY,
  themeInUse,
} from "../../../client/app/theme.ts";

let systemIsDark = false;
const watchers = new Set<() => void>();

beforeEach(() => {
  systemIsDark = false;
  vi.spyOn(window, "matchMedia").mockImplementation(
    () =>
      ({
        get matches() {
          return systemIsDark;
        },
        addEventListener: (_name: string, watcher: () => void) => watchers.add(watcher),
        removeEventListener: (_name: string, watcher: () => void) => watchers.delete(watcher),
      }) as unknown as MediaQueryList, // Only what the theme asks of it.
  );
  chooseTheme("system");
  localStorage.clear();
});
afterEach(() => {
  vi.restoreAllMocks();
  watchers.clear();
});

const shown = () => document.documentElement.dataset["theme"];

describe("the theme", () => {
  it("is the system's until one is chosen, and follows it", () => {
    const stop = followTheme();
    expect(shown()).toBe("day");
    systemIsDark = true;
    for (const watcher of watchers) watcher();
    expect(shown()).toBe("night");
    stop();
    expect(watchers.size).toBe(0);
  });

  it("keeps what was chosen, whatever the system says", () => {
    chooseTheme("night");
    expect([shown(), localStorage.getItem(THEME_KEY), readThemeChoice()]).toEqual([
      "night",
      "night",
      "night",
    ]);
    systemIsDark = true;
    chooseTheme("day");
    expect(themeInUse()).toBe("day");
  });

  it("forgets the choice when it is left to the system again", () => {
    chooseTheme("night");
    chooseTheme("system");
    expect(localStorage.getItem(THEME_KEY)).toBeNull();
  });

  it("follows a choice made in another tab", () => {
    const stop = followTheme();
    localStorage.setItem(THEME_KEY, "night");
    window.dispatchEvent(new StorageEvent("storage", { key: THEME_KEY }));
    expect(shown()).toBe("night");
    stop();
  });
});

describe("the script before the first paint", () => {
  const source = readFileSync(join(import.meta.dirname, "../../../client/app/first-paint.js"), "utf8");
  function firstPaint(stored: Record<string, string> | null, dark: boolean): string | undefined {
    const documentElement: { dataset: { theme?: string } } = { dataset: {} };
    const page = { document: { documentElement }, matchMedia: () => ({ matches: dark }) };
    // A browser that refuses storage throws when it is touched.
    Object.defineProperty(page, "localStorage", {
      get() {
        if (!stored) throw new Error("SecurityError");
        return { getItem: (key: string) => stored[key] ?? null };
      },
    });
    runInNewContext(source, page);
    return documentElement.dataset.theme;
  }
  it.each([
    ["nothing stored, light system", {}, false, "day"],
    ["nothing stored, dark system", {}, true, "night"],
    ["night chosen, light system", { [THEME_KEY]: "night" }, false, "night"],
    ["day chosen, dark system", { [THEME_KEY]: "day" }, true, "day"],
    ["nonsense stored, dark system", { [THEME_KEY]: "dusk" }, true, "night"],
    ["storage refused, dark system", null, true, "night"],
  ])("agrees with the theme: %s", (_case, stored, dark, theme) => {
    expect(firstPaint(stored, dark)).toBe(theme);
  });
});
