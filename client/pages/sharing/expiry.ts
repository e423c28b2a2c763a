/** How long a referee link may live, as one chooses it. */
export const expiryChoices = [
  ["30", "In 30 days"],
  ["90", "In 90 days"],
  ["365", "In a year"],
  ["date", "On a date"],
  ["never", "Never"],
] as const;
export type ExpiryChoice = (typeof expiryChoices)[number][0];

export type Expiry =
  | { readonly ok: true; readonly expiresAt: string | null }
  | { readonly ok: false; readonly sentence: string };

/** A date means the end of that day where the person is; `day` is "2026-12-31", as a date field gives it. */
export function expiryOf(choice: ExpiryChoice, day: string, now: Date): Expiry {
  if (choice === "never") return { ok: true, expiresAt: null };
  if (choice !== "date") {
    const then = new Date(now);
    then.setDate(then.getDate() + Number(choice));
    return { ok: true, expiresAt: then.toISOString() };
  }
  const end = new Date(`${day}T23:59:59`);
  if (Number.isNaN(end.getTime()))
    return { ok: false, sentence: "Choose the last day on which the link opens." };
  if (end <= now) return { ok: false, sentence: "This day has passed. Choose today or a later day." };
  return { ok: true, expiresAt: end.toISOString() };
}
