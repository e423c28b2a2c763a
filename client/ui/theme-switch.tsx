import { useSyncExternalStore } from "react";
import { chooseTheme, onThemeChange, readThemeChoice, themeChoices, type ThemeChoice } from "../app/theme.ts";

const names: Readonly<Record<ThemeChoice, string>> = { day: "Day", night: "Night", system: "System" };

/** Day, night, or as the system says. A native list: three choices need nothing more. */
export function ThemeSwitch() {
  const choice = useSyncExternalStore(onThemeChange, readThemeChoice);
  return (
    <select
      aria-label="Light of the page"
      value={choice}
      className="min-h-6 border-b border-tick bg-paper text-small text-ink hover:border-ink"
      onChange={(event) => {
        const chosen = themeChoices.find((known) => known === event.target.value);
        if (chosen) chooseTheme(chosen);
      }}
    >
      {themeChoices.map((known) => (
        <option key={known} value={known}>
          {names[known]}
        </option>
      ))}
    </select>
  );
}
