/** Which addresses a link may have. Anything else is shown as plain words, never as a link. */

// Browsers drop control characters and white space inside a scheme, so "java\nscript:" would still run.
// eslint-disable-next-line no-control-regex -- control characters are what is being removed
const ignoredByBrowsers =
  /[\u0000-\u0020\u007f-\u00a0\u1680\u180e\u2000-\u200f\u2028\u2029\u202f\u205f\u2060\u3000\ufeff]/g;

/** True for http, https and mailto addresses; relative and scheme-less ones are refused. */
export function isSafeLink(address: unknown): address is string {
  if (typeof address !== "string" || address.length > 4000) return false;
  return /^(?:https?:\/\/[^/]|mailto:[^@]+@)/i.test(address.replace(ignoredByBrowsers, ""));
}
