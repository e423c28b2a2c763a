/** A decimal as people type it, with any minus sign; null for anything else. */
export function plainNumber(text: string): number | null {
  const number = Number(text.trim().replace("−", "-"));
  return text.trim() !== "" && Number.isFinite(number) ? number : null;
}
