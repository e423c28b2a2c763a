/** Day, night, or as the system says. The choice is kept in this browser; "system" keeps nothing. */
export const themeChoices = ["day", "night", "system"] as const;
export type ThemeChoice = (typeof themeChoices)[number];
export type Theme = "day" | "night";

/** Also written in first-paint.js, which runs before any module. */
export const THEME_KEY = "subleading.theme";

const listeners = new Set<() => void>();

/** A browser that refuses storage gets the system's theme, and the choice lasts as long as the page. */
let choiceOfThisPage: ThemeChoice | null = null;

export function readThemeChoice(): ThemeChoice {
  if (choiceOfThisPage) return choiceOfThisPage;
  const stored = storage()?.getItem(THEME_KEY);
  return stored === "day" || stored === "night" ? stored : "system";
}

export function chooseTheme(choice: ThemeChoice): void {
  choiceOfThisPage = choice;
  if (choice === "system") storage()?.removeItem(THEME_KEY);
  else storage()?.setItem(THEME_KEY, choice);
  applyTheme();
  for (const listener of listeners) listener();
}

export function themeInUse(): Theme {
  const choice = readThemeChoice();
  if (choice !== "system") return choice;
  return systemPrefersNight().matches ? "night" : "day";
}

/** Keeps the page in step with the system and with other tabs. Returns the way to stop. */
export function followTheme(): () => void {
  const night = systemPrefersNight();
  const refresh = () => {
    applyTheme();
    for (const listener of listeners) listener();
  };
  const fromAnotherTab = (event: StorageEvent) => {
    if (event.key !== THEME_KEY) return;
    choiceOfThisPage = null;
    refresh();
  };
  night.addEventListener("change", refresh);
  window.addEventListener("storage", fromAnotherTab);
  applyTheme();
  return () => {
    night.removeEventListener("change", refresh);
    window.removeEventListener("storage", fromAnotherTab);
  };
}

export function onThemeChange(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

function applyTheme(): void {
  document.documentElement.dataset["theme"] = themeInUse();
}

function systemPrefersNight(): MediaQueryList {
  return window.matchMedia("(prefers-color-scheme: dark)");
}

function storage(): Storage | null {
  try {
    return window.localStorage;
  } catch {
    // Blocked by the reader's privacy settings: nothing is remembered, everything else works.
    return null;
  }
}
