/** Every role, and everyone without one, against everything that can be done: one line per action. */
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { World } from "./http-world.ts";
import { createWorld } from "./http-world.ts";
import { httpLines } from "./roles-http-lines.ts";
import { assembleCast, setScene, snapshot, whos, type Cast } from "./roles-scene.ts";
import { socketLines } from "./roles-socket-lines.ts";

let world: World;
let cast: Cast;
beforeAll(async () => {
  world = await createWorld();
  cast = await assembleCast(world);
});
afterAll(() => world.stop());

const table = [...httpLines, ...socketLines(() => cast.browsers.get("owner")!)];

describe.each(table)("$action", ({ prepare, attempt, verdicts, changes }) => {
  it.each(whos)("%s", async (who) => {
    const { actor, scene } = await setScene(world, cast, who);
    await prepare?.(scene);
    const before = await snapshot(scene);
    const verdict = await attempt(actor, scene);
    expect(verdict).toBe(verdicts[who]);
    const isChanged = (await snapshot(scene)) !== before;
    expect(isChanged, "the notebook is changed").toBe(changes && verdict === "done");
  });
});
