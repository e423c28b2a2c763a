/** What those who may only read can and cannot do over a socket. */
import { describe, expect, test } from "vitest";
import * as Y from "yjs";
import { closeCode } from "../../../client/contract/collab.ts";
import { accessScene, typed } from "./access-scene.ts";
import { addRefereeLink } from "./cast.ts";
import { openRaw, presence, presenceIn, step1, step2, update, type RawSocket } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { paragraphOf, textOf } from "./writer.ts";

const stage = setStage();
const { setRole, storedRows } = accessScene(stage);

describe("reading only lets nothing through", () => {
  const readers: readonly (readonly [string, (notebookId: string) => Promise<RawSocket>])[] = [
    ["a reader", (notebookId) => stage.raw(stage.cleo, notebookId)],
    [
      "a reviewer",
      async (notebookId) => {
        await setRole(notebookId, stage.cleo, "reviewer");
        return stage.raw(stage.cleo, notebookId);
      },
    ],
    [
      "a referee",
      async (notebookId) =>
        stage.raw(null, notebookId, {
          token: (await addRefereeLink(stage.server.database, notebookId)).token,
        }),
    ],
    [
      "the owner of an archived notebook",
      async (notebookId) => {
        await stage.server.database.raw("update notebooks set archived_at = now() where id = ?", [
          notebookId,
        ]);
        return stage.raw(stage.ada, notebookId);
      },
    ],
  ];
  test.each(readers)("%s: not by an update, nor by a step 2", async (_who, open) => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("kept");
    await writer.allSaved();
    const before = await storedRows(notebookId);
    const socket = await open(notebookId);
    socket.send(step1());
    await until("the document is there", () => textOf(socket.document) === "kept");
    for (const frame of [update(typed("smuggled")), step2(typed("smuggled too"))]) {
      const said = socket.notices().length;
      socket.send(frame);
      await until("it is refused", () => socket.notices().length > said);
      expect(socket.notices().at(-1)).toMatchObject({ about: "rejected" });
    }
    expect(socket.saved()).toBe(0);
    expect(await storedRows(notebookId)).toBe(before);
    expect(writer.text()).toBe("kept");
  });

  test.each(readers.slice(0, 3))("%s: not by presence", async (_who, open) => {
    const notebookId = await stage.notebook();
    const watcher = await stage.raw(stage.ada, notebookId);
    const socket = await open(notebookId);
    socket.send(presence([77, 1, { user: { name: "Someone" } }]));
    const ben = await stage.raw(stage.ben, notebookId);
    ben.send(presence([78, 1, {}]));
    await until("a writer's presence is seen", () => presenceIn(watcher).has(78));
    expect(presenceIn(watcher).has(77)).toBe(false);
  });

  test("one who keeps trying is closed", async () => {
    const socket = await stage.raw(stage.cleo, await stage.notebook());
    for (let attempt = 0; attempt < 40; attempt += 1) socket.send(update(typed(`attempt ${attempt}`)));
    expect(await socket.closedWith()).toBe(closeCode.forbidden);
  });

  test("what a reader has already may be sent back", async () => {
    const notebookId = await stage.notebook();
    const writer = await stage.write(stage.ada, notebookId);
    writer.type("kept");
    await writer.allSaved();
    const socket = await stage.raw(stage.cleo, notebookId);
    socket.send(step2(Y.encodeStateAsUpdate(writer.document)));
    socket.send(step1());
    await until("the document is there", () => textOf(socket.document) === "kept");
    expect(socket.notices()).toEqual([]);
  });
});

test("a referee who may not know the authors receives no presence", async () => {
  const notebookId = await stage.notebook();
  const hidden = await addRefereeLink(stage.server.database, notebookId, { hideAuthors: true });
  const shown = await addRefereeLink(stage.server.database, notebookId);
  const blind = await stage.raw(null, notebookId, { token: hidden.token });
  const seeing = await stage.raw(null, notebookId, { token: shown.token });
  const ada = await stage.write(stage.ada, notebookId);
  ada.awareness.setLocalState({ user: {} });
  ada.type("text");
  await until("the other referee sees her", () => presenceIn(seeing).size > 0);
  blind.send(Uint8Array.of(3)); // asks for presence
  blind.send(step1());
  await until("the document is there", () => textOf(blind.document) === "text");
  expect(presenceIn(blind).size).toBe(0);
});

test("a referee's document holds no deleted sentence", async () => {
  const notebookId = await stage.notebook();
  const ada = await stage.write(stage.ada, notebookId);
  const { token } = await addRefereeLink(stage.server.database, notebookId);
  // Large, so that people who join get a kept encoding; whole, so that there is one.
  ada.type("x".repeat(50_000));
  await ada.allSaved();
  await stage.write(stage.cleo, notebookId);
  ada.type("UNFORTUNATE");
  await ada.allSaved();
  await stage.write(stage.ben, notebookId);
  const text = paragraphOf(ada.document);
  text.delete(50_000, "UNFORTUNATE".length);
  await ada.allSaved();
  const referee = await openRaw({ port: stage.server.port, notebookId, token });
  referee.send(step1());
  await until("the document is there", () => textOf(referee.document).length === 50_000);
  for (const { bytes } of referee.frames) expect(Buffer.from(bytes).includes("UNFORTUNATE")).toBe(false);
  referee.stop();
});
