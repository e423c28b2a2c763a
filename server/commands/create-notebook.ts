/** Makes a notebook with its maker as owner, and fills it from a template in the same transaction. */
import type { Knex } from "knex";
import type { Template } from "#contract/templates.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import type { Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";

/** Writes the template's document into an empty notebook. */
export type SeedNotebook = (
  transaction: Knex.Transaction,
  notebookId: string,
  template: Template,
) => Promise<void>;

interface NewNotebook {
  readonly title: string;
  readonly template: Template;
  readonly personId: string;
  readonly seedNotebook: SeedNotebook;
}

/** The notebook's id. */
export function createNotebook(
  database: Database,
  { title, template, personId, seedNotebook }: NewNotebook,
): Promise<string> {
  return database.transaction(async (transaction) => {
    const [made] = await transaction("notebooks")
      .insert({ title, schema_version: SCHEMA_VERSION, created_by: personId, changed_by: personId })
      .returning<{ id: string }[]>("id");
    if (made === undefined) throw new Error("PostgreSQL inserted a notebook and returned none.");
    await transaction("notebook_people").insert({ notebook_id: made.id, person_id: personId, role: "owner" });
    await recordEvent(transaction, {
      personId,
      notebookId: made.id,
      what: "notebook-created",
      details: { template },
    });
    await seedNotebook(transaction, made.id, template);
    return made.id;
  });
}
