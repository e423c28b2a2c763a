/** The charges of a field as typed: "3, 2, 1/6", one for each group in the order of their table. */

/**
 * Commas within Dynkin labels separate nothing.
 * @example splitCharges("(1,1), 2") // ["(1,1)", "2"]
 */
export function splitCharges(text: string): readonly string[] {
  return text.split(/,(?![^(]*\))/).map((part) => part.trim());
}

/**
 * With the charge under one group replaced; those before it that were left out are neutral.
 * @param neutral by group, what stands for no charge
 * @example withCharge("3", 2, "1/6", ["1", "1", "0"]) // "3, 1, 1/6"
 */
export function withCharge(text: string, at: number, charge: string, neutral: readonly string[]): string {
  const parts = splitCharges(text);
  const length = Math.max(parts.length, at + 1);
  return Array.from({ length }, (_, index) =>
    index === at ? charge : parts[index] || (neutral[index] ?? "0"),
  ).join(", ");
}
