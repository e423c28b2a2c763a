/** Writes a template's document into a notebook that was just made. */
import type { SeedNotebook } from "./create-notebook.ts";

export const seedNotebook: SeedNotebook = (_transaction, _notebookId, template) => {
  // A blank document is one without updates.
  if (template === "blank") return Promise.resolve();
  throw new Error(`There is no document for the template ${template} yet.`);
};
