/** Someone who comes for the first time finds the demonstrations on the shelf, each a copy of their own. */
import { firstRow, type Database } from "../data/database.ts";
import { createNotebook } from "./create-notebook.ts";
import { LANTERN_TITLE } from "./lantern-notebook.ts";
import { DEMONSTRATION_SEEDED } from "./seed-demonstration.ts";
import { seedNotebook } from "./seed-notebook.ts";
import { TERN_TITLE } from "./tern-notebook.ts";

/** The last one made stands first on the shelf. */
const welcome = [
  { title: TERN_TITLE, template: "tern" },
  { title: LANTERN_TITLE, template: "lantern" },
] as const;

/** For a person who was just made. Whoever takes part in the seeded demonstrations has them already. */
export async function welcomePerson(database: Database, personId: string): Promise<void> {
  const hasThem = await firstRow(
    database,
    `select 1 as found from notebook_people join events using (notebook_id)
      where notebook_people.person_id = ? and events.what = ? limit 1`,
    [personId, DEMONSTRATION_SEEDED],
  );
  if (hasThem !== undefined) return;
  for (const { title, template } of welcome) {
    await createNotebook(database, { title, template, personId, seedNotebook });
  }
}
