/** In a demonstration, two notebooks wait for their two invented authors to sign in for the first time. */
import { SCHEMA_VERSION } from "#schema/version.ts";
import { firstRow, type Database } from "../data/database.ts";
import { recordEvent } from "../data/events.ts";
import { LANTERN_TITLE } from "./lantern-notebook.ts";
import { seedNotebook } from "./seed-notebook.ts";
import { TERN_TITLE } from "./tern-notebook.ts";

const waitingFor = [
  { login: "wren-lantern", role: "owner" },
  { login: "otto-lantern", role: "author" },
] as const;
const waitingNotebooks = [
  { title: TERN_TITLE, template: "tern" },
  { title: LANTERN_TITLE, template: "lantern" },
] as const;
/** The event that marks a seeded notebook. */
export const DEMONSTRATION_SEEDED = "demonstration-seeded";

/** Does nothing when it has been done before, also when people have since deleted the notebooks. */
export function seedDemonstration(database: Database): Promise<void> {
  return database.transaction(async (transaction) => {
    await transaction.raw("lock table notebooks in share row exclusive mode");
    const before = await firstRow(transaction, "select 1 as found from events where what = ? limit 1", [
      DEMONSTRATION_SEEDED,
    ]);
    if (before !== undefined) return;
    for (const { title, template } of waitingNotebooks) {
      const [made] = await transaction("notebooks")
        // The transaction's own time would be the same for both, and the shelf sorts by it.
        .insert({
          title,
          schema_version: SCHEMA_VERSION,
          changed_at: transaction.raw("clock_timestamp()"),
        })
        .returning<{ id: string }[]>("id");
      if (made === undefined) throw new Error("PostgreSQL inserted a notebook and returned none.");
      await transaction("invitations").insert(
        waitingFor.map((person) => ({ notebook_id: made.id, ...person })),
      );
      await seedNotebook(transaction, made.id, template);
      await recordEvent(transaction, { personId: null, notebookId: made.id, what: DEMONSTRATION_SEEDED });
    }
  });
}
