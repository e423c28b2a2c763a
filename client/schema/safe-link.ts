/** Which addresses a link may have. Anything else is shown as plain words, never as a link. */

// Browsers drop control characters and white space inside a scheme, so "java\nscript:" would still run.
const ignoredByBrowsers = /[\p{Cc}\p{Cf}\s]/gu;

/** True for http, https and mailto addresses; relative and scheme-less ones are refused. */
export function isSafeLink(address: unknown): boolean {
  if (typeof address !== "string" || address.length > 4000) return false;
  return /^(?:https?:\/\/[^/]|mailto:[^@]+@)/i.test(address.replace(ignoredByBrowsers, ""));
}
