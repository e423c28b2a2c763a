// Runs before the first paint, so that a page read at night never flashes white. Kept apart from the modules
// (they run later) and out of the page's text (the content security policy allows no inline script).
/* global document, matchMedia */
(() => {
  let stored;
  try {
    stored = localStorage.getItem("subleading.theme");
  } catch {
    // Storage is blocked: nothing is remembered, so the system decides.
  }
  const night =
    stored === "night" || (stored !== "day" && matchMedia("(prefers-color-scheme: dark)").matches);
  document.documentElement.dataset.theme = night ? "night" : "day";
})();
