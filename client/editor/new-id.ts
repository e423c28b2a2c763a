/** A new id for a block, row, pin or equation. */
export function newId(): string {
  // randomUUID exists in secure contexts only; a notebook served over plain HTTP on a private network has none.
  if (typeof crypto.randomUUID === "function") return crypto.randomUUID();
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, "0")).join("");
}
