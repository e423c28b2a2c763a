/** Writes a template's document into a notebook that was just made. */
import { seedDocument } from "../compute/seed-document.ts";
import type { SeedNotebook } from "./create-notebook.ts";
import { pinsOf } from "./pin-maker.ts";
import { documentOf } from "./templates.ts";

export const seedNotebook: SeedNotebook = async (transaction, notebookId, template) => {
  // A blank document is one without updates.
  if (template === "blank") return;
  const { blocks, write } = documentOf(template);
  await seedDocument(transaction, notebookId, write(pinsOf(blocks)));
};
