/** The demonstration notebooks are complete and agree with themselves. */
import { evaluateNotebook, readDocument } from "#engine/index.ts";
import { ternBlocks } from "../../server/commands/tern-notebook.ts";
import { expect, test } from "vitest";
import { seedDemonstration } from "../../server/commands/seed-demonstration.ts";
import { openDatabase, rows } from "../../server/data/database.ts";
import { createTestDatabase } from "./database.ts";

test("both notebooks wait for their authors, with every result stored and every pin holding", async () => {
  const { url, drop } = await createTestDatabase();
  const database = openDatabase(url);
  try {
    await seedDemonstration(database);
    await seedDemonstration(database);
    const notebooks = await rows<{ premises_line: string; pins_moved: number; pins_loose: number }>(
      database,
      "select premises_line, pins_moved, pins_loose from notebooks order by title",
    );
    expect(notebooks).toEqual([
      { premises_line: "d = 4 · 2 fields · 9 terms", pins_moved: 0, pins_loose: 0 },
      { premises_line: "D = 3, z = 2 · 3 fields · 7 terms", pins_moved: 0, pins_loose: 0 },
    ]);
    const results = await rows<{ block_id: string; problems: unknown[]; has_value: boolean }>(
      database,
      `select block_id, value -> 'problems' as problems, value -> 'value' <> 'null'::jsonb as has_value
         from notebook_results join results using (key) order by block_id`,
    );
    expect(results.map(({ block_id }) => block_id)).toEqual([
      "lantern",
      "lantern-error",
      "lantern-graph",
      "lantern-plan",
      "lantern-scaling",
      "tern",
      "tern-data",
      "tern-error",
      "tern-graph",
      "tern-plan",
      "tern-scaling",
    ]);
    for (const result of results) expect(result).toMatchObject({ problems: [], has_value: true });
    const waiting = await rows<{ login: string; role: string }>(
      database,
      "select login, role from invitations order by login",
    );
    expect(waiting).toEqual([
      { login: "otto-lantern", role: "author" },
      { login: "otto-lantern", role: "author" },
      { login: "wren-lantern", role: "owner" },
      { login: "wren-lantern", role: "owner" },
    ]);
  } finally {
    await database.destroy();
    await drop();
  }
});

test("the Tern notebook's 68 % intervals cover about 68 % of what is exactly known there", () => {
  const { blocks } = readDocument({ type: "doc", content: ternBlocks });
  const onInternalError = (error: unknown) => {
    throw error;
  };
  const outcomes = evaluateNotebook(blocks, { memo: new Map(), onInternalError });
  const scalars = outcomes.find(({ blockId }) => blockId === "tern-error")?.evaluation.scalars ?? [];
  const share = (degree: number) => {
    const value = scalars.find(({ id }) => id === `covered/${degree}`)?.value;
    return value?.type === "number" ? value.value : NaN;
  };
  // 31 neighbours along one curve count as few: the share may stray by this much.
  expect(Math.abs(share(68) - 0.68)).toBeLessThan(0.05);
  expect(Math.abs(share(95) - 0.95)).toBeLessThan(0.05);
});
