/** Places on the page that links lead to. */
export const CHECK_SHEET = "check-sheet";
